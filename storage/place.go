package storage

import (
	"errors"
	"os"
	"os/user"
	"path/filepath"
	"runtime"
)

// DefaultPath returns where a user's register lies when no other is named:
// register.anodewright in the program's folder among the user's data. The
// error says that the system names no such folder.
func DefaultPath() (string, error) {
	folder, err := dataFolder(runtime.GOOS, os.Getenv)
	if err != nil {
		return "", err
	}
	return filepath.Join(folder, "register.anodewright"), nil
}

func dataFolder(system string, env func(string) string) (string, error) {
	under := func(root string, names ...string) string {
		return filepath.Join(append([]string{root}, names...)...)
	}
	switch home := env("HOME"); system {
	case "windows":
		if local := env("LOCALAPPDATA"); local != "" {
			return under(local, "Anodewright"), nil
		}
		if profile := env("USERPROFILE"); profile != "" {
			return under(profile, "AppData", "Local", "Anodewright"), nil
		}
	case "darwin":
		if home != "" {
			return under(home, "Library", "Application Support", "Anodewright"), nil
		}
	default:
		// The XDG base directory specification: a relative path counts as none.
		if data := env("XDG_DATA_HOME"); filepath.IsAbs(data) {
			return under(data, "anodewright"), nil
		}
		if home != "" {
			return under(home, ".local", "share", "anodewright"), nil
		}
	}
	return "", errors.New("the system names no folder for the user's data, so say where the register lies")
}

// userName is who edits when Open is not told: the system's name of the user.
func userName() string {
	u, err := user.Current()
	switch {
	case err != nil:
		return "unknown"
	case u.Name != "":
		return u.Name
	}
	return u.Username
}
