// Package profile holds the outlines of bodies of revolution: lines and arcs in
// the half plane of radius r and height z, r to the right and z up.
//
// A Profile is made of strokes as a description lists them; New checks it by
// itself and reports every Fault with its stroke. A Plane lays several profiles
// over each other: it cuts them where they meet, merges what coincides and finds
// the faces they enclose with the axis, so that it is known what lies on either
// side of every edge.
//
// Points closer than a millionth of the extent count as one.
package profile
