package say

import (
	"fmt"
	"testing"
)

// BenchmarkSentence says a caution that was not said before: the longest way.
func BenchmarkSentence(b *testing.B) {
	b.Cleanup(func() { Use("en") })
	Use("es")
	for n := range b.N {
		Sentence(fmt.Sprintf("Short of output: in Kattegat, 30 %% of the year, the anodes give %d A of 39.7 A by 2032-04-26.", n))
	}
}

// BenchmarkSentenceAgain says one that was said before.
func BenchmarkSentenceAgain(b *testing.B) {
	b.Cleanup(func() { Use("en") })
	Use("es")
	for range b.N {
		Sentence("Short of output: in Kattegat, 30 % of the year, the anodes give 30.2 A of 39.7 A by 2032-04-26.")
	}
}

// BenchmarkUse reads the table and makes its templates, at the start.
func BenchmarkUse(b *testing.B) {
	for range b.N {
		Use("es")
		Use("en")
	}
}
