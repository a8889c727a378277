package main

import (
	"bytes"
	"encoding/binary"
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"anodewright/assets/icon"
)

// icoSizes are the widths in the exe's icon; an ICO file goes up to 256.
var icoSizes = []int{16, 24, 32, 48, 64, 128, 256}

// ico returns an icon file of PNG pictures of these sizes in pixels.
func ico(sizes []int, picture func(size int) []byte) []byte {
	const header, entry = 6, 16
	var b bytes.Buffer
	put := func(values ...any) {
		for _, v := range values {
			binary.Write(&b, binary.LittleEndian, v) // to memory: it cannot fail
		}
	}
	put(uint16(0), uint16(1), uint16(len(sizes)))
	offset := header + entry*len(sizes)
	for _, s := range sizes {
		n := len(picture(s))
		put(uint8(s), uint8(s), uint8(0), uint8(0), uint16(1), uint16(32), uint32(n), uint32(offset)) // 256 is written as 0
		offset += n
	}
	for _, s := range sizes {
		b.Write(picture(s))
	}
	return b.Bytes()
}

// resourceScript tells windres of the icon, the version and that the program
// draws on screens of any density by itself.
func resourceScript(version string) string {
	numbers := strings.ReplaceAll(version, ".", ",") + ",0"
	return fmt.Sprintf(`1 ICON "icon.ico"
1 24 "manifest.xml"
1 VERSIONINFO
FILEVERSION %[1]s
PRODUCTVERSION %[1]s
FILEOS 0x40004
FILETYPE 1
BEGIN
  BLOCK "StringFileInfo"
  BEGIN
    BLOCK "080904b0"
    BEGIN
      VALUE "FileDescription", "Anodewright"
      VALUE "FileVersion", "%[2]s"
      VALUE "InternalName", "anodewright"
      VALUE "OriginalFilename", "anodewright.exe"
      VALUE "ProductName", "Anodewright"
      VALUE "ProductVersion", "%[2]s"
    END
  END
  BLOCK "VarFileInfo"
  BEGIN
    VALUE "Translation", 0x0809, 0x04b0
  END
END
`, numbers, version)
}

const manifest = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<assembly xmlns="urn:schemas-microsoft-com:asm.v1" manifestVersion="1.0">
  <application xmlns="urn:schemas-microsoft-com:asm.v3">
    <windowsSettings>
      <dpiAware xmlns="http://schemas.microsoft.com/SMI/2005/WindowsSettings">true/pm</dpiAware>
      <longPathAware xmlns="http://schemas.microsoft.com/SMI/2016/WindowsSettings">true</longPathAware>
    </windowsSettings>
  </application>
</assembly>
`

// resource writes what windres reads.
func (b bundle) resource() error {
	for name, data := range map[string][]byte{
		"icon.ico": ico(icoSizes, icon.PNG), "manifest.xml": []byte(manifest), "resource.rc": []byte(resourceScript(b.version)),
	} {
		path := b.built(name)
		if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
			return err
		}
		if err := os.WriteFile(path, data, 0o644); err != nil {
			return err
		}
	}
	return nil
}
