package main

import (
	"bytes"
	"fmt"
	"regexp"
	"slices"
	"strings"

	"github.com/spf13/pflag"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/rules"
)

// gapFlags are the keys of a spacing and its site as flags.
type gapFlags struct {
	set   *pflag.FlagSet
	keys  []document.Declared // leaves of [site], then of [[spacing]], and the tables within
	sizes []document.Declared // of the shape and the ribs
}

// ofSite are the keys of the site that a gap between no nodes depends on.
var ofSite = []string{"site.altitude", "site.air_temperature", "site.pollution_degree"}

// elsewhere are the keys of a spacing that name what no flag describes: nodes and fields.
var elsewhere = []string{"spacing.from", "spacing.to", "spacing.also", "spacing.field"}

const (
	shapePath = "spacing.shape"
	ribsPath  = "spacing.ribs"
	gapName   = "gap" // where none is given
)

// within are the tables of a spacing that are one flag each, with what their flag means.
var within = map[string][2]string{
	shapePath: {"SHAPE", "electrodes and their sizes, as in 'coaxial inner_radius=3mm outer_radius=63mm'"},
	ribsPath:  {"RIBS", "ribs across the surface, over which the creepage is measured, as in 'count=5 depth=8mm width=5mm'"},
}

// tableOf is the table within a spacing that a key belongs to, empty where none.
func tableOf(path string) string {
	for _, table := range []string{shapePath, ribsPath} {
		if strings.HasPrefix(path, table+".") {
			return table
		}
	}
	return ""
}

// newGapFlags declares the flags from the declaration of the description.
func newGapFlags(set *pflag.FlagSet) *gapFlags {
	g := &gapFlags{set: set}
	for _, d := range document.DescribeTables(&chain.Chain{}, "site", "spacing") {
		table, rest, _ := strings.Cut(d.Path, ".")
		switch {
		case tableOf(d.Path) != "":
			g.sizes = append(g.sizes, d)
		case within[d.Path] != [2]string{}:
			g.keys = append(g.keys, d)
			set.Var(&gapValue{kind: within[d.Path][0]}, flagName(d), within[d.Path][1])
		case slices.Contains(ofSite, d.Path), table == "spacing" && leaf(d, rest) && !slices.Contains(elsewhere, d.Path):
			g.keys = append(g.keys, d)
			g.declare(d)
		}
	}
	set.SortFlags = false
	return g
}

func leaf(d document.Declared, rest string) bool {
	return rest != "" && !strings.Contains(rest, ".") && d.Holds != document.OneTable && d.Holds != document.SomeTables && d.List == ""
}

func flagName(d document.Declared) string { return strings.ReplaceAll(d.Key, "_", "-") }

func (g *gapFlags) declare(d document.Declared) {
	usage := meaning(d)
	switch {
	case len(d.Words) > 0:
		usage += ": " + strings.Join(d.Words, ", ")
	case d.Holds != document.AYesNo:
		usage += ", as in " + example(d)
	}
	flag := g.set.VarPF(&gapValue{kind: kindOfValue(d)}, flagName(d), "", usage)
	if d.Holds == document.AYesNo {
		flag.NoOptDefVal = "true"
	}
}

// meaning is what a key means where there are no nodes.
func meaning(d document.Declared) string {
	return strings.TrimSuffix(d.Means, ", in place of from and to")
}

// gapValue is the text of a flag, not yet read.
type gapValue struct{ text, kind string }

func (v *gapValue) String() string     { return v.text }
func (v *gapValue) Set(s string) error { v.text = s; return nil }
func (v *gapValue) Type() string       { return v.kind }

func example(d document.Declared) string {
	if strings.Contains(d.Example, " ") {
		return "'" + d.Example + "'"
	}
	return d.Example
}

func kindOfValue(d document.Declared) string {
	switch {
	case d.Dimension != nil:
		return strings.ToUpper(d.Dimension.Name)
	case d.Holds == document.AText:
		return "TEXT"
	case d.Holds == document.AYesNo:
		return "bool" // shown without a value
	}
	return "NUMBER"
}

// block writes the description that the flags make, and tells which flag made each of
// its lines.
func (g *gapFlags) block() (block []byte, flags []string) {
	var b bytes.Buffer
	add := func(flag, line string) {
		b.WriteString(line + "\n")
		flags = append(flags, flag)
	}
	add("", "format = 1")
	table := ""
	for _, d := range g.keys {
		of, _, _ := strings.Cut(d.Path, ".")
		given := g.set.Changed(flagName(d))
		if of == "site" && !given {
			continue
		}
		if of != table {
			add("", "")
			add("", map[string]string{"site": "[site]", "spacing": "[[spacing]]"}[of])
			table = of
		}
		switch {
		case given:
			add(flagName(d), g.line(d))
		case d.Path == "spacing.name":
			add("", d.Assign(gapName))
		}
	}
	return b.Bytes(), flags
}

func (g *gapFlags) line(d document.Declared) string {
	text := g.set.Lookup(flagName(d)).Value.String()
	if within[d.Path] != [2]string{} {
		return d.Key + " = " + g.table(d.Path, text)
	}
	return d.Assign(text)
}

// sizeKey begins a size in the text of a shape.
var sizeKey = regexp.MustCompile(`[\s,]*([A-Za-z0-9_-]+)\s*=`)

// table makes a table from "coaxial inner_radius=3mm outer_radius=63mm"; what stands before
// the first size is the kind of a shape.
func (g *gapFlags) table(path, text string) string {
	at := sizeKey.FindAllStringSubmatchIndex(text, -1)
	kind := text
	if len(at) > 0 {
		kind = text[:at[0][0]]
	}
	var pairs []string
	if kind = strings.TrimSpace(kind); path == shapePath || kind != "" {
		pairs = append(pairs, g.size(path, "kind").Assign(kind))
	}
	for i, m := range at {
		end := len(text)
		if i+1 < len(at) {
			end = at[i+1][0]
		}
		value := strings.TrimRight(strings.TrimSpace(text[m[1]:end]), ",")
		pairs = append(pairs, g.size(path, text[m[2]:m[3]]).Assign(strings.TrimSpace(value)))
	}
	return "{ " + strings.Join(pairs, ", ") + " }"
}

// size is the declaration of a key of a table; an unknown one is a text, for the reader to
// refuse.
func (g *gapFlags) size(path, key string) document.Declared {
	for _, d := range g.sizes {
		if d.Key == key && tableOf(d.Path) == path {
			return d
		}
	}
	return document.Declared{Key: key, Holds: document.AText}
}

// read reads a block and gives its faults by the flags that made its lines.
func (g *gapFlags) read(block []byte, flags []string) (*chain.Chain, []string) {
	var told []string
	for _, d := range g.keys {
		if (d.Path == "spacing.voltage" || d.Path == "spacing.medium") && !g.set.Changed(flagName(d)) {
			told = append(told, fmt.Sprintf("--%s: not given; %s, as in --%s %s", flagName(d), meaning(d), flagName(d), example(d)))
		}
	}
	c, faults := rules.Read(block)
	for _, f := range faults {
		flag := flags[min(max(f.Line, 1), len(flags))-1]
		if flag == "" {
			continue // of the header: told above
		}
		told = append(told, faultOf(flag, f))
	}
	if len(faults) > 0 && len(told) == 0 {
		panic("main: faults of a block that no flag made: " + faults.Error())
	}
	return c, told
}

func faultOf(flag string, f document.Fault) string {
	text := "--" + flag + ": "
	if table := tableOf(f.Key); table != "" {
		text += strings.TrimPrefix(f.Key, table+".") + ": "
	}
	text += f.What
	if f.Remedy != "" {
		text += "; " + f.Remedy
	}
	return text
}
