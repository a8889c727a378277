package assets

import "embed"

//go:embed demo/*.json
var demoFiles embed.FS

// Demo returns the asset files of the demo fleet in fleet order: a cargo
// ship, a tanker, a jacket, a jetty and a sealine of an invented operator.
func Demo() [][]byte {
	files, err := demoFiles.ReadDir("demo") // sorted by name: each starts with its place in the fleet
	if err != nil {
		panic("assets: " + err.Error())
	}
	var fleet [][]byte
	for _, f := range files {
		text, err := demoFiles.ReadFile("demo/" + f.Name())
		if err != nil {
			panic("assets: " + err.Error())
		}
		fleet = append(fleet, text)
	}
	return fleet
}
