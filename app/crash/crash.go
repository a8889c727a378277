// Package crash keeps what a crash of the program says: a text file in a
// folder of the user's, with the program's version and the stack of every
// goroutine. The file is never sent anywhere; the next start tells where it
// is.
package crash

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"runtime"
	"runtime/debug"
	"strings"
	"time"
)

const (
	running = "running " // begins the name of the file of a program that runs
	ended   = "crash "   // and that of one that fell over
	ending  = ".txt"
)

// mark ends the head of a file; what comes after it was written by a crash.
const mark = "\n--- what the crash said ---\n"

// Guard has the crash of any goroutine written into a file of the folder. The
// function it returns is to be called when the program ends as it should.
func Guard(folder, version string, now time.Time) (done func(), err error) {
	if err := os.MkdirAll(folder, 0o700); err != nil {
		return nil, err
	}
	path := filepath.Join(folder, fmt.Sprintf("%s%d%s", running, os.Getpid(), ending))
	f, err := os.OpenFile(path, os.O_CREATE|os.O_WRONLY|os.O_TRUNC, 0o600)
	if err != nil {
		return nil, err
	}
	fmt.Fprintf(f, "Anodewright %s on %s/%s, %s, started %s\n%s", version, runtime.GOOS, runtime.GOARCH, runtime.Version(), now.Format(time.RFC3339), mark)
	if err := debug.SetCrashOutput(f, debug.CrashOptions{}); err != nil {
		f.Close()
		os.Remove(path)
		return nil, err
	}
	f.Close() // the runtime has a copy of its own
	return func() {
		debug.SetCrashOutput(nil, debug.CrashOptions{})
		os.Remove(path)
	}, nil
}

// stale is the age from which a file without a crash in it is taken away: its
// program was killed, or has run for a week.
const stale = 7 * 24 * time.Hour

// Collect gives the files that crashes have left lasting names, and returns
// their paths. Files of programs that ended as they should, or still run, are
// no crashes.
func Collect(folder string, now time.Time) (paths []string) {
	files, err := os.ReadDir(folder)
	if err != nil {
		return nil // nothing was ever kept
	}
	for _, file := range files {
		if !strings.HasPrefix(file.Name(), running) || !strings.HasSuffix(file.Name(), ending) {
			continue
		}
		from := filepath.Join(folder, file.Name())
		text, err := os.ReadFile(from)
		info, statErr := file.Info()
		if err != nil || statErr != nil {
			continue
		}
		_, said, found := bytes.Cut(text, []byte(mark))
		if !found || len(bytes.TrimSpace(said)) == 0 {
			if now.Sub(info.ModTime()) > stale {
				os.Remove(from)
			}
			continue
		}
		to := filepath.Join(folder, ended+info.ModTime().UTC().Format("2006-01-02 150405")+ending)
		if os.Rename(from, to) == nil {
			paths = append(paths, to)
		}
	}
	return paths
}
