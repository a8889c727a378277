package main

import (
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"

	"anodewright/cmd/internal/offline"
	"anodewright/hull"
)

// TestMain makes the command one that scripts can run; its machine's date is
// always 2026-12-01. Whichever script runs it, opening a network connection
// kills it, where the system can do that.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){
		"schedule": func() {
			if err := offline.Deny(); err != nil && !errors.Is(err, errors.ErrUnsupported) {
				panic(err)
			}
			os.Exit(run(os.Args[1:], os.Stdout, os.Stderr, hull.NewDate(2026, 12, 1)))
		},
	})
}

// TestScripts runs the scripts of testdata. Beside the usual words they know
// "exits STATUS COMMAND ..." and "json PATH WANT", which asks that standard
// output is one JSON value and no more, and what stands at a path in it.
func TestScripts(t *testing.T) {
	assets, err := filepath.Abs("../../testdata/assets")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir: "testdata",
		Setup: func(env *testscript.Env) error {
			env.Setenv("ASSETS", assets)
			env.Setenv("DEMO", filepath.Join(filepath.Dir(filepath.Dir(assets)), "assets", "demo"))
			return nil
		},
		Cmds: map[string]func(ts *testscript.TestScript, neg bool, args []string){
			"exits": exits,
			"json":  jsonAt,
		},
	})
}

func exits(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: exits STATUS COMMAND ...")
	}
	status := 0
	var exit *exec.ExitError
	if err := ts.Exec(args[1], args[2:]...); errors.As(err, &exit) {
		status = exit.ExitCode()
	} else if err != nil {
		ts.Fatalf("%v", err)
	}
	if strconv.Itoa(status) != args[0] {
		ts.Fatalf("exit status %d, want %s", status, args[0])
	}
}

func jsonAt(ts *testscript.TestScript, neg bool, args []string) {
	if len(args) != 2 {
		ts.Fatalf("usage: json PATH WANT")
	}
	d := json.NewDecoder(strings.NewReader(ts.ReadFile("stdout")))
	var v any
	ts.Check(d.Decode(&v))
	if _, err := d.Token(); err != io.EOF {
		ts.Fatalf("standard output goes on after the JSON value: %v", err)
	}
	for _, step := range strings.Split(args[0], ".") {
		switch at := v.(type) {
		case map[string]any:
			next, ok := at[step]
			if !ok {
				ts.Fatalf("%s: no field %s", args[0], step)
			}
			v = next
		case []any:
			if step == "length" {
				v = float64(len(at))
				continue
			}
			i, err := strconv.Atoi(step)
			if err != nil || i < 0 || i >= len(at) {
				ts.Fatalf("%s: no item %s of %d", args[0], step, len(at))
			}
			v = at[i]
		default:
			ts.Fatalf("%s: nothing below %v", args[0], v)
		}
	}
	same := fmt.Sprint(v) == args[1]
	if x, number := v.(float64); number {
		want, err := strconv.ParseFloat(args[1], 64)
		same = err == nil && math.Abs(x-want) <= 1e-9*math.Max(1, math.Abs(want))
	}
	if same == neg {
		ts.Fatalf("%s is %v, the script says %s", args[0], v, args[1])
	}
}
