package main

import (
	"runtime/debug"

	"kilovet"
)

// version is that of the project and, where the build recorded it, the commit it
// was made from.
func version() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return kilovet.Version
	}
	return kilovet.Version + commit(info.Settings)
}

func commit(settings []debug.BuildSetting) string {
	revision, modified := "", ""
	for _, s := range settings {
		switch s.Key {
		case "vcs.revision":
			revision = "+" + s.Value[:min(len(s.Value), 12)]
		case "vcs.modified":
			if s.Value == "true" {
				modified = ".modified"
			}
		}
	}
	if revision == "" {
		return ""
	}
	return revision + modified
}
