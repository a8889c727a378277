package grid

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"
)

func TestCopyCellAndTable(t *testing.T) {
	g, z, w := show(t, 1, 2)
	z.rows[0][0] = "tab\there"
	click(g, 0, 0)
	clip := test.NewClipboard()
	focused := w.Canvas().Focused().(fyne.Shortcutable)
	focused.TypedShortcut(&fyne.ShortcutCopy{Clipboard: clip})
	if clip.Content() != "tab here" {
		t.Errorf("copied %q", clip.Content())
	}
	focused.TypedShortcut(&fyne.ShortcutSelectAll{})
	focused.TypedShortcut(&fyne.ShortcutCopy{Clipboard: clip})
	want := "zone\twetted area [m²]\tcoating\tcode\n" +
		"tab here\t100\tepoxy\tZ00\n" +
		"zone 1\t101\tepoxy\tZ01\n"
	if clip.Content() != want {
		t.Errorf("copied %q, want %q", clip.Content(), want)
	}
	key(w, fyne.KeyDown)
	if g.Copy() != "zone 1" {
		t.Errorf("after a move all is still selected: %q", g.Copy())
	}
}

func TestCutEmptiesTheCell(t *testing.T) {
	g, z, w := show(t, 1, 2)
	click(g, 0, 1)
	clip := test.NewClipboard()
	w.Canvas().Focused().(fyne.Shortcutable).TypedShortcut(&fyne.ShortcutCut{Clipboard: clip})
	if clip.Content() != "100" {
		t.Errorf("cut %q", clip.Content())
	}
	wantCommits(t, z, "0,1=")
	wantSelected(t, g, 0, 1)
}

func TestPasteBlock(t *testing.T) {
	g, z, w := show(t, 1, 3)
	more := 0
	g.OnPasteRows = func(n int) {
		more = n
		for range n {
			z.rows = append(z.rows, [3]string{})
		}
	}
	click(g, 1, 1)
	clip := test.NewClipboard()
	clip.SetContent("5\tvinyl\tX\r\n6 \tnone\tX\r\nbad\tnone\tX\r\n")
	w.Canvas().Focused().(fyne.Shortcutable).TypedShortcut(&fyne.ShortcutPaste{Clipboard: clip})
	if more != 1 {
		t.Errorf("asked for %d rows, want 1", more)
	}
	// the fourth column cannot be edited and is left out
	wantCommits(t, z, "1,1=5 1,2=vinyl 2,1=6 2,2=none 3,1=bad 3,2=none")
	if g.src.Cell(3, 1).Fault == "" || z.rows[3][1] != "bad" {
		t.Error("a wrong text in the block is not kept with its fault")
	}
}

func TestPasteWithoutRoomIsCut(t *testing.T) {
	g, z, _ := show(t, 1, 2)
	g.Paste("x") // nothing selected
	g.Select(1, 1)
	g.Paste("1\n2\n3")
	g.Paste("")
	wantCommits(t, z, "1,1=1")
}

func TestOnPasteMayTakeTheBlock(t *testing.T) {
	g, z, _ := show(t, 1, 2)
	var got string
	g.OnPaste = func(row, col int, block [][]string) bool {
		for _, f := range block {
			got += strings.Join(f, "|") + ";"
		}
		return row == 0
	}
	g.Select(0, 0)
	g.Paste("a\tb\nc\td")
	if got != "a|b;c|d;" {
		t.Errorf("block %q", got)
	}
	wantCommits(t, z, "")
}
