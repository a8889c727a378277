package main

import (
	"fmt"
	"strings"
)

// need is one thing outside Go that a build or a test calls for. It is looked
// for by what it brings, not by its package, so that a copy from elsewhere
// counts too.
type need struct {
	pkg   string   // Debian package that brings it
	why   string   // what it is for, to be read after "to"
	tools []string // programs that must be in PATH
	files []string // glob patterns, each of which must match a file
}

// buildNeeds are for building the app with its OpenGL window on Linux.
var buildNeeds = []need{
	{
		pkg: "clang", why: "compile the OpenGL bindings (gcc takes minutes longer)",
		tools: []string{"clang"},
	},
	{
		pkg: "pkg-config", why: "tell the compiler where OpenGL is",
		tools: []string{"pkg-config"},
	},
	{
		pkg: "libgl1-mesa-dev", why: "build against OpenGL",
		files: []string{"/usr/include/GL/gl.h", "/usr/lib*/*/pkgconfig/gl.pc"},
	},
	{
		pkg: "xorg-dev", why: "build against the X window system",
		files: []string{
			"/usr/include/X11/Xlib.h",
			"/usr/include/X11/Xcursor/Xcursor.h",
			"/usr/include/X11/extensions/Xrandr.h",
			"/usr/include/X11/extensions/Xinerama.h",
			"/usr/include/X11/extensions/XInput2.h",
			"/usr/include/X11/extensions/xf86vmode.h",
		},
	},
}

// testNeeds are what the tests call for beyond buildNeeds.
var testNeeds = []need{
	{
		pkg: "coinor-cbc", why: "solve the plans a second time, by another solver",
		tools: []string{"cbc"},
	},
	{
		pkg: "xvfb", why: "give the window tests a screen of their own",
		tools: []string{"Xvfb"},
	},
	{
		pkg: "libgl1-mesa-dri", why: "draw OpenGL without a graphics card",
		files: []string{"/usr/lib*/*/dri/swrast_dri.so"},
	},
	{
		pkg: "xdotool", why: "press keys and buttons in the window tests",
		tools: []string{"xdotool"},
	},
	{
		pkg: "imagemagick", why: "take screenshots in the window tests",
		tools: []string{"import"},
	},
	{
		pkg: "libreoffice-calc-nogui", why: "recalculate exported workbooks independently",
		tools: []string{"soffice"},
		files: []string{"/usr/lib*/libreoffice/program/libsclo.so"},
	},
}

// missing returns the needs that the machine does not meet, in their order.
func missing(m machine, needs []need) []need {
	var out []need
	for _, n := range needs {
		if !m.meets(n) {
			out = append(out, n)
		}
	}
	return out
}

// reasons lists needs for a reader: each package and what it is for.
func reasons(needs []need) string {
	parts := make([]string, len(needs))
	for i, n := range needs {
		parts[i] = fmt.Sprintf("%s to %s", n.pkg, n.why)
	}
	return strings.Join(parts, "; ")
}

// packages returns the Debian packages that bring the needs.
func packages(needs []need) []string {
	out := make([]string, len(needs))
	for i, n := range needs {
		out[i] = n.pkg
	}
	return out
}
