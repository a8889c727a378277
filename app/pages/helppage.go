package pages

import (
	"embed"
	"fmt"
	"strings"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
	"anodewright/app/say"
)

//go:embed help
var helpFiles embed.FS

// helpName is the file of a page's help.
func helpName(p page) string {
	switch p.(type) {
	case *steel:
		return "steel"
	case *anodesPage:
		return "anodes"
	case *readingsPage:
		return "readings"
	case *forecastPage:
		return "forecast"
	case *dockings:
		return "dockings"
	case *dockFloor:
		return "dockfloor"
	case *orderPage:
		return "order"
	case *basisPage:
		return "basis"
	}
	return "general"
}

// helpText is a help file in the language in force, in English where that has
// none.
func helpText(name string) string {
	for _, language := range []string{say.Language(), "en"} {
		if text, err := helpFiles.ReadFile(fmt.Sprintf("help/%s/%s.md", language, name)); err == nil {
			return string(text)
		}
	}
	panic("pages: no help named " + name)
}

// helpLines turns a help file into what is shown: its headings, paragraphs and
// points. The first heading is the dialog's title.
func helpLines(text string) (title string, lines []fyne.CanvasObject) {
	for line := range strings.SplitSeq(text, "\n") {
		heading, isHeading := strings.CutPrefix(line, "# ")
		point, isPoint := strings.CutPrefix(line, "- ")
		switch {
		case isHeading && title == "":
			title = heading
		case isHeading:
			lines = append(lines, lift(4), look.Heading(heading))
		case isPoint:
			lines = append(lines, look.Body("• "+point))
		case line != "":
			lines = append(lines, look.Body(line))
		}
	}
	return title, lines
}

// helpAbout shows the help of the page that is open.
func (f *Frame) helpAbout() {
	name := helpName(f.pages[f.current])
	if f.s.Asset() == nil {
		name = "general"
	}
	f.showHelp(name)
}

// showHelp shows a help file.
func (f *Frame) showHelp(name string) {
	title, lines := helpLines(helpText(name))
	f.read(title, lines)
}
