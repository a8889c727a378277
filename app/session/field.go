package session

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
)

// Field is one thing that a person can edit as text: of the asset itself, or
// of the i-th item of one of its lists.
type Field struct {
	Key      string // its name in the asset file, below the item
	Title    string
	Unit     string // of SI; it is shown as Quantity says
	Hint     string // what it means, and what leaving it empty means
	Number   bool
	Quantity say.Quantity
	Get      func(a *hull.Asset, i int) string
	Set      func(a *hull.Asset, i int, text string) error
	Choices  func(a *hull.Asset) []string // nil: free text
}

// at finds a field's variable in an asset.
type at[T any] func(a *hull.Asset, i int) *T

func textField(key, title string, v at[string]) Field {
	return Field{
		Key: key, Title: title,
		Get: func(a *hull.Asset, i int) string { return *v(a, i) },
		Set: func(a *hull.Asset, i int, text string) error { *v(a, i) = strings.TrimSpace(text); return nil },
	}
}

func numberField(key, title, unit string, v at[float64]) Field {
	return quantityField(key, title, unit, say.Of(unit), v)
}

// quantityField is a number of a quantity that its unit alone does not tell.
func quantityField(key, title, unit string, q say.Quantity, v at[float64]) Field {
	return Field{
		Key: key, Title: title, Unit: unit, Number: true, Quantity: q,
		Get: func(a *hull.Asset, i int) string { return shownNumber(q, *v(a, i)) },
		Set: func(a *hull.Asset, i int, text string) (err error) {
			*v(a, i), err = parseShown(q, text, *v(a, i))
			return err
		},
	}
}

// optionalField is a number that may be left empty.
func optionalField(key, title, unit string, v at[*float64]) Field {
	return optionalQuantity(key, title, unit, say.Of(unit), v)
}

func optionalQuantity(key, title, unit string, q say.Quantity, v at[*float64]) Field {
	return Field{
		Key: key, Title: title, Unit: unit, Number: true, Quantity: q,
		Get: func(a *hull.Asset, i int) string {
			if p := *v(a, i); p != nil {
				return shownNumber(q, *p)
			}
			return ""
		},
		Set: func(a *hull.Asset, i int, text string) error {
			was := math.NaN()
			if p := *v(a, i); p != nil {
				was = *p
			}
			*v(a, i) = nil
			if strings.TrimSpace(text) == "" {
				return nil
			}
			x, err := parseShown(q, text, was)
			if err == nil {
				*v(a, i) = &x
			}
			return err
		},
	}
}

func countField(key, title string, v at[int]) Field {
	return Field{
		Key: key, Title: title, Number: true,
		Get: func(a *hull.Asset, i int) string { return strconv.Itoa(*v(a, i)) },
		Set: func(a *hull.Asset, i int, text string) (err error) {
			*v(a, i), err = parseCount(text)
			return err
		},
	}
}

func parseCount(text string) (int, error) {
	x, err := ParseNumber(text)
	if err != nil || x != float64(int(x)) {
		return 0, fmt.Errorf("want a whole number, got %q", text)
	}
	return int(x), nil
}

func dateField(key, title string, v at[hull.Date]) Field {
	return Field{
		Key: key, Title: title,
		Get: func(a *hull.Asset, i int) string { return dayToType(*v(a, i)) },
		Set: func(a *hull.Asset, i int, text string) (err error) {
			*v(a, i) = 0
			if text = strings.TrimSpace(text); text != "" {
				*v(a, i), err = ParseDay(text)
			}
			return err
		},
	}
}

func yesNoField(key, title string, v at[bool]) Field {
	return Field{
		Key: key, Title: title,
		Get: func(a *hull.Asset, i int) string {
			if *v(a, i) {
				return say.T("yes")
			}
			return say.T("no")
		},
		Set: func(a *hull.Asset, i int, text string) error {
			switch strings.ToLower(strings.TrimSpace(text)) {
			case "yes", "y", say.T("yes"):
				*v(a, i) = true
			case "no", "n", say.T("no"):
				*v(a, i) = false
			default:
				return fmt.Errorf("want yes or no, got %q", text)
			}
			return nil
		},
		Choices: func(*hull.Asset) []string { return []string{say.T("yes"), say.T("no")} },
	}
}

// wordField is a field of one of a set of words, which are shown with blanks
// in place of their hyphens.
func wordField[T ~string](key, title string, words []string, v at[T]) Field {
	var shown []string
	for _, w := range words {
		shown = append(shown, Words(w))
	}
	return Field{
		Key: key, Title: title,
		Get: func(a *hull.Asset, i int) string { return Words(*v(a, i)) },
		Set: func(a *hull.Asset, i int, text string) error {
			*v(a, i) = T(wordOf(words, text))
			return nil
		},
		Choices: func(*hull.Asset) []string { return shown },
	}
}

// wordOf finds the asset file's word that a person typed, in the file's own
// language or the user's; a text that is none of them becomes a word like them,
// for the check to refuse.
func wordOf(words []string, text string) string {
	typed := strings.Join(strings.Fields(text), " ")
	word := strings.ReplaceAll(typed, " ", "-")
	for _, w := range words {
		if strings.EqualFold(w, word) || strings.EqualFold(Words(w), typed) {
			return w
		}
	}
	return word
}

// Words writes one of the asset file's words for people.
func Words[T ~string](w T) string { return say.T(strings.ReplaceAll(string(w), "-", " ")) }

// hint adds a hint to a field.
func (f Field) hint(text string) Field {
	f.Hint = text
	return f
}
