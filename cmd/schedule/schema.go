package main

import (
	"io"

	"anodewright/storage/assetfile"
)

// printSchema writes the asset file's form as a JSON Schema.
func printSchema(w io.Writer) error {
	_, err := w.Write(assetfile.Schema())
	return err
}
