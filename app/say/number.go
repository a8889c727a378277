package say

import (
	"fmt"
	"strings"
	"sync/atomic"
)

var comma atomic.Bool

// UseComma chooses a decimal comma in place of the point.
func UseComma(on bool) { comma.Store(on) }

// Comma tells whether decimals stand behind a comma.
func Comma() bool { return comma.Load() }

// Decimal writes a number's text, made with a decimal point, with the chosen
// sign.
func Decimal(number string) string {
	if Comma() {
		return strings.Replace(number, ".", ",", 1)
	}
	return number
}

// decimal is a number that is formatted with the chosen decimal sign.
type decimal float64

func (d decimal) Format(f fmt.State, verb rune) {
	fmt.Fprint(f, Decimal(fmt.Sprintf(fmt.FormatString(f, verb), float64(d))))
}

// decimals makes the numbers among the arguments of a text follow the chosen
// decimal sign.
func decimals(args []any) []any {
	if !Comma() {
		return args
	}
	out := make([]any, len(args))
	for i, a := range args {
		switch x := a.(type) {
		case float64:
			a = decimal(x)
		case float32:
			a = decimal(x)
		}
		out[i] = a
	}
	return out
}
