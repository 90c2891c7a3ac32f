package main

import (
	"runtime/debug"
	"strings"
)

// version is set by the build script (-ldflags "-X main.version=…").
var version string

// programVersion is the version printed by --version: the one set at build time,
// otherwise what the toolchain recorded.
func programVersion() string {
	if version != "" {
		return version
	}
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return "unversioned"
	}
	if v := info.Main.Version; v != "" && v != "(devel)" {
		return strings.TrimPrefix(v, "v")
	}
	for _, s := range info.Settings {
		if s.Key == "vcs.revision" && len(s.Value) >= 12 {
			return s.Value[:12]
		}
	}
	return "unversioned"
}

func programName() string { return "lobecast " + programVersion() }
