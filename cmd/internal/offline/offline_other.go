//go:build !linux || !(amd64 || arm64)

// Package offline proves in tests, on Linux, that a program opens no network
// connection.
package offline

import "errors"

// Deny is not to be had here.
func Deny() error { return errors.ErrUnsupported }
