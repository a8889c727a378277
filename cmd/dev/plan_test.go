package main

import (
	"slices"
	"strings"
	"testing"
)

// fake returns a Linux machine that has everything except the tools and file
// patterns named.
func fake(without ...string) machine {
	has := func(name string) bool { return !slices.Contains(without, name) }
	return machine{root: "/src", goos: "linux", goarch: "amd64", admin: true, aptLists: true, hasTool: has, hasFile: has}
}

// argvs returns the commands of steps, each as one line.
func argvs(steps []step) []string {
	var out []string
	for _, s := range steps {
		out = append(out, strings.Join(s.argv, " "))
	}
	return out
}

func TestMissingNamesOnlyWhatIsAbsent(t *testing.T) {
	got := packages(missing(fake("clang", "/usr/include/X11/extensions/Xrandr.h"), buildNeeds))
	if want := []string{"clang", "xorg-dev"}; !slices.Equal(got, want) {
		t.Errorf("missing %v, want %v", got, want)
	}
	if got := missing(fake(), slices.Concat(buildNeeds, testNeeds)); len(got) != 0 {
		t.Errorf("a complete machine misses %v", got)
	}
}

func TestEveryNeedCanBeFoundAndExplained(t *testing.T) {
	for _, n := range slices.Concat(buildNeeds, testNeeds) {
		if len(n.tools)+len(n.files) == 0 {
			t.Errorf("%s: nothing to look for", n.pkg)
		}
		if !strings.Contains(reasons([]need{n}), n.pkg+" to ") || n.why == "" {
			t.Errorf("%s: reason %q", n.pkg, n.why)
		}
	}
}

func TestRunOnCompleteMachineBuildsAndStarts(t *testing.T) {
	p, err := planRun(fake(), []string{"-register", "a b.db"})
	if err != nil {
		t.Fatal(err)
	}
	want := []string{"go build -v -buildvcs=false -tags migrated_fynedo -o /src/bin/anodewright ./cmd/anodewright"}
	if got := argvs(p.first); !slices.Equal(got, want) {
		t.Errorf("first %q, want %q", got, want)
	}
	if want := []string{"/src/bin/anodewright", "-demo", "-register", "a b.db"}; !slices.Equal(p.last[0].argv, want) {
		t.Errorf("starts %q, want %q", p.last[0].argv, want)
	}
	if !slices.Contains(p.first[0].env, "CC=clang") {
		t.Errorf("built with %v, want clang", p.first[0].env)
	}
}

func TestInstallCommands(t *testing.T) {
	const apt = "env DEBIAN_FRONTEND=noninteractive apt-get -q -o DPkg::Lock::Timeout=300 "
	const get = apt + "install -y --no-install-recommends --no-remove "
	cases := []struct {
		name   string
		change func(*machine)
		absent []string
		want   []string
	}{
		{"root", nil, []string{"clang"}, []string{get + "clang"}},
		{"no lists", func(m *machine) { m.aptLists = false }, []string{"clang", "Xvfb"},
			[]string{apt + "update", get + "clang xvfb"}},
		{"user", func(m *machine) { m.admin = false }, []string{"import"}, []string{"sudo " + get + "imagemagick"}},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			m := fake(c.absent...)
			if c.change != nil {
				c.change(&m)
			}
			p, err := planTest(m, nil)
			if err != nil {
				t.Fatal(err)
			}
			if got := argvs(p.first); !slices.Equal(got, c.want) {
				t.Errorf("got %q, want %q", got, c.want)
			}
			if p.first[len(p.first)-1].kind != stepInstall {
				t.Error("the installation would not be tried again with new lists")
			}
			if note := strings.Join(p.notes, " "); !strings.Contains(note, "apt-get") {
				t.Errorf("the note %q does not say what is installed how", note)
			}
		})
	}
}

func TestUserWithoutSudoIsToldWhatToRun(t *testing.T) {
	m := fake("clang", "sudo")
	m.admin = false
	_, err := planRun(m, nil)
	if err == nil || !strings.Contains(err.Error(), "apt-get install clang") {
		t.Errorf("got %v, want the command to run as root", err)
	}
}

func TestOtherLinuxNamesWhatIsMissingAndGoesOn(t *testing.T) {
	p, err := planRun(fake("apt-get", "clang"), nil)
	if err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(strings.Join(p.notes, " "), "clang") || len(p.first) != 1 {
		t.Errorf("notes %q, steps %q", p.notes, argvs(p.first))
	}
	if slices.Contains(p.first[0].env, "CC=clang") {
		t.Error("would build with a clang that is not there")
	}
	if p, err = planRun(fake("apt-get", "clang", "gcc"), nil); err == nil || len(p.notes) == 0 {
		t.Errorf("without any compiler: notes %q, error %v; want both", p.notes, err)
	}
}

func TestOtherSystems(t *testing.T) {
	cases := []struct{ goos, compiler, binary string }{
		{"darwin", "clang", "anodewright"},
		{"windows", "gcc", "anodewright.exe"},
	}
	for _, c := range cases {
		m := fake(c.compiler)
		m.goos = c.goos
		if _, err := planRun(m, nil); err == nil || !strings.Contains(err.Error(), "C compiler") {
			t.Errorf("%s without %s: %v", c.goos, c.compiler, err)
		}
		m = fake()
		m.goos = c.goos
		p, err := planRun(m, nil)
		if err != nil || len(p.first) != 1 || !strings.HasSuffix(p.last[0].argv[0], c.binary) {
			t.Errorf("%s: %v, %q then %q", c.goos, err, argvs(p.first), argvs(p.last))
		}
		p, err = planTest(m, nil)
		if err != nil || p.last[0].kind != stepLeftOut {
			t.Errorf("%s: %v, window tests %q should be left out openly", c.goos, err, argvs(p.last))
		}
	}
}

func TestTestPlan(t *testing.T) {
	p, err := planTest(fake(), []string{"-short"})
	if err != nil {
		t.Fatal(err)
	}
	if len(p.first) != 0 || !p.summary {
		t.Errorf("first %q, summary %v", argvs(p.first), p.summary)
	}
	if want := []string{"", "go vet -tags ci ./...", "go run " + staticcheck + " -tags ci ./...", "go test -tags ci -short ./..."}; !slices.Equal(argvs(p.checks), want) {
		t.Errorf("checks %q, want %q", argvs(p.checks), want)
	}
	for _, s := range p.checks[1:] {
		if !slices.Contains(s.env, "CGO_ENABLED=0") {
			t.Errorf("%s would need a C compiler", s.name)
		}
	}
	// The toolkit's thread checks must be in this build: no tag.
	if want := []string{"go build -v -buildvcs=false -o /src/bin/anodewright-checked ./cmd/anodewright"}; !slices.Equal(argvs(p.beside), want) {
		t.Errorf("beside %q, want %q", argvs(p.beside), want)
	}
	if want := []string{"go test -tags e2e -count=1 -short ./cmd/anodewright"}; !slices.Equal(argvs(p.last), want) {
		t.Errorf("last %q, want %q", argvs(p.last), want)
	}
	if env := p.last[0].env; !slices.Contains(env, "ANODEWRIGHT_BIN=/src/bin/anodewright-checked") || !slices.Contains(env, "LANG=en_GB.UTF-8") {
		t.Errorf("window tests run with %q", env)
	}
}
