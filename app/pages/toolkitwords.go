package pages

import (
	"encoding/json"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/lang"

	"anodewright/app/say"
)

// toolkitWords are the words that the toolkit's own dialogs and menus say: of
// files, and of the text in an entry.
var toolkitWords = []string{
	say.Mark("Advanced"), say.Mark("Cancel"), say.Mark("Confirm"), say.Mark("Copy"), say.Mark("Create Folder"), say.Mark("Cut"),
	say.Mark("Enter filename"), say.Mark("Error"), say.Mark("Favourites"), say.Mark("File"), say.Mark("Folder"), say.Mark("New Folder"),
	say.Mark("No"), say.Mark("OK"), say.Mark("Open"), say.Mark("Paste"), say.Mark("Quit"), say.Mark("Redo"), say.Mark("Save"),
	say.Mark("Select all"), say.Mark("Show Hidden Files"), say.Mark("Undo"), say.Mark("Yes"),
}

// toolkitSpeaks is the language last given to the toolkit.
var toolkitSpeaks string

// tellToolkit gives the toolkit its words in the language in force. It speaks
// the machine's language and has no way to choose another, so that its words
// are replaced under the machine's own locale.
func tellToolkit() {
	if say.Language() == toolkitSpeaks {
		return
	}
	locale := lang.SystemLocale()
	if toolkitSpeaks == "" && strings.HasPrefix(string(locale), say.Language()) {
		return // as it does by itself
	}
	words := map[string]any{"file.name": map[string]string{"other": say.T("Name")}, "file.parent": map[string]string{"other": say.T("Parent")}}
	for _, w := range toolkitWords {
		words[w] = say.T(w)
	}
	text, err := json.Marshal(words)
	if err == nil {
		err = lang.AddTranslationsForLocale(text, locale)
	}
	if err != nil {
		fyne.LogError("the toolkit's words could not be replaced", err)
		return
	}
	toolkitSpeaks = say.Language()
}
