package storage

import (
	"encoding/binary"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
)

// inspect looks at the file at path without the database's help, so that a
// file of another program is never touched. It returns the version that the
// file says it is.
func inspect(path string) (version int, err error) {
	info, err := os.Stat(path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return 0, because(ErrMissing, "", err)
	case err != nil:
		return 0, fileFailure(err)
	case info.IsDir():
		return 0, because(ErrFolder, "", nil)
	case !info.Mode().IsRegular():
		return 0, because(ErrNotRegister, "it is no ordinary file", nil)
	case info.Size() == 0:
		return 0, because(ErrEmptyFile, "", nil)
	}
	f, err := os.Open(path)
	if err != nil {
		return 0, fileFailure(err)
	}
	defer f.Close()
	head := make([]byte, sqliteHead)
	n, err := io.ReadFull(f, head)
	if err != nil && !errors.Is(err, io.ErrUnexpectedEOF) {
		return 0, fileFailure(err)
	}
	if n < len(sqliteMagic) || string(head[:len(sqliteMagic)]) != sqliteMagic {
		detail := "it is a file of another kind"
		if head[0] == '{' {
			detail = "it looks like an asset file, which is imported into a register"
		}
		return 0, because(ErrNotRegister, detail, nil)
	}
	if n < sqliteHead {
		return 0, because(ErrDamaged, fmt.Sprintf("it ends after %d bytes", n), nil)
	}
	if id := binary.BigEndian.Uint32(head[sqliteApplicationID:]); id != applicationID {
		return 0, because(ErrNotRegister, "it is a database of another program", nil)
	}
	v := int32(binary.BigEndian.Uint32(head[sqliteUserVersion:]))
	if v < 1 {
		return 0, because(ErrDamaged, fmt.Sprintf("it says that it is version %d, which never was", v), nil)
	}
	return int(v), nil
}

// fileFailure explains an error of the system about the file or its folder.
func fileFailure(err error) *Error {
	var reason error = err
	var pe *fs.PathError
	if errors.As(err, &pe) {
		reason = pe.Err
	}
	if errors.Is(err, fs.ErrPermission) {
		return because(ErrForbidden, "", err)
	}
	return because(ErrDisk, reason.Error(), err)
}
