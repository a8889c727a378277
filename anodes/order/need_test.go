package order

import (
	"math"
	"math/rand/v2"
	"testing"

	"pgregory.net/rapid"
)

// need draws a distribution of a few pieces.
func need(t *rapid.T, label string) Need {
	n := Need{From: rapid.IntRange(0, 12).Draw(t, label+" from")}
	all := 0.0
	for _, w := range rapid.SliceOfN(rapid.IntRange(0, 9), 1, 6).Draw(t, label) {
		n.P = append(n.P, float64(w))
		all += float64(w)
	}
	if all == 0 {
		n.P[0], all = 1, 1
	}
	for k := range n.P {
		n.P[k] /= all
	}
	return n
}

// The convolution is that of enumerating every combination.
func TestSumsOfNeedsAgainstEnumeration(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		needs := []Need{need(t, "a"), need(t, "b"), need(t, "c"), need(t, "d")}
		want := map[int]float64{}
		var all func(k, pieces int, p float64)
		all = func(k, pieces int, p float64) {
			if k == len(needs) {
				want[pieces] += p
				return
			}
			for i, q := range needs[k].P {
				all(k+1, pieces+needs[k].From+i, p*q)
			}
		}
		all(0, 0, 1)
		got := Need{}
		for _, n := range needs {
			got = got.Plus(n)
		}
		mean, sum := 0.0, 0.0
		for k, p := range got.P {
			if math.Abs(p-want[got.From+k]) > 1e-12 {
				t.Fatalf("%d pieces: probability %g, by enumeration %g", got.From+k, p, want[got.From+k])
			}
			delete(want, got.From+k)
			sum += p
		}
		for pieces, p := range want {
			if p > 1e-12 {
				t.Fatalf("%d pieces: probability 0, by enumeration %g", pieces, p)
			}
		}
		for _, n := range needs {
			mean += n.Mean()
		}
		if math.Abs(sum-1) > 1e-9 || math.Abs(mean-got.Mean()) > 1e-9 {
			t.Fatalf("probabilities add up to %g; mean %g, sum of the means %g", sum, got.Mean(), mean)
		}
	})
}

// No number of pieces is cheaper than the critical fractile's.
func TestFractileIsTheCheapest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := need(t, "need").Plus(need(t, "more"))
		f := Few{rapid.Float64Range(0.01, 10).Draw(t, "too many"), rapid.Float64Range(0.01, 10).Draw(t, "too few")}
		best := n.Quantile(f.Fractile())
		for pieces := n.From - 1; pieces <= n.From+len(n.P); pieces++ {
			if f.Expected(n, pieces) < f.Expected(n, best)-1e-9 {
				t.Fatalf("%d pieces cost %g, the fractile's %d %g", pieces, f.Expected(n, pieces), best, f.Expected(n, best))
			}
		}
	})
}

// The newsvendor's closed forms: of a need that is even over 1 to n pieces the
// fractile c asks for n c rounded up; of a geometric one, with q of each
// further piece, ln(1-c)/ln q - 1 rounded up.
func TestClosedNewsvendorForms(t *testing.T) {
	for _, f := range []Few{{1, 1}, {1, 2}, {3, 1}, {2, 18}, {0.99, 0.01}} {
		c := f.Fractile()
		even := Need{From: 1, P: make([]float64, 37)}
		for k := range even.P {
			even.P[k] = 1.0 / 37
		}
		if got, want := even.Quantile(c), int(math.Ceil(37*c-1e-9)); got != want {
			t.Errorf("even over 1 to 37, fractile %g: %d pieces, want %d", c, got, want)
		}
		const q = 0.8
		geometric := Need{P: make([]float64, 400)}
		for k := range geometric.P {
			geometric.P[k] = (1 - q) * math.Pow(q, float64(k))
		}
		if got, want := geometric.Quantile(c), int(math.Ceil(math.Log(1-c)/math.Log(q)-1-1e-9)); got != max(0, want) {
			t.Errorf("geometric, fractile %g: %d pieces, want %d", c, got, max(0, want))
		}
	}
	if got := (Few{}).Fractile(); got != 0.5 {
		t.Errorf("nothing costs anything: fractile %g", got)
	}
}

// By the closed form the least expected cost of a normal need of mean m and
// deviation s is (too many + too few) s phi(z) at the fractile's z.
func TestExpectedCostOfANormalNeed(t *testing.T) {
	const mean, sd = 500, 60
	n := Need{P: make([]float64, 1001)}
	for k := range n.P {
		upper, lower := (float64(k)+0.5-mean)/sd, (float64(k)-0.5-mean)/sd
		n.P[k] = (math.Erf(upper/math.Sqrt2) - math.Erf(lower/math.Sqrt2)) / 2
	}
	f := Few{TooMany: 310, TooFew: 620}
	z := math.Sqrt2 * math.Erfinv(2*f.Fractile()-1)
	if got, want := n.Quantile(f.Fractile()), int(math.Round(mean+z*sd)); got < want-1 || got > want+1 {
		t.Errorf("%d pieces, want %d", got, want)
	}
	want := (f.TooMany + f.TooFew) * sd * math.Exp(-z*z/2) / math.Sqrt(2*math.Pi)
	if got := f.Expected(n, n.Quantile(f.Fractile())); math.Abs(got-want) > 0.002*want {
		t.Errorf("expected cost %g, by the closed form %g", got, want)
	}
}

func TestMixtures(t *testing.T) {
	m := Mix([]Need{Certain(3), Certain(10), {}}, []float64{1, 2, 1})
	for pieces, want := range map[int]float64{-1: 0, 0: 0.25, 2: 0.25, 3: 0.5, 9: 0.5, 10: 1, 99: 1} {
		if got := m.UpTo(pieces); math.Abs(got-want) > 1e-12 {
			t.Errorf("at most %d pieces: %g, want %g", pieces, got, want)
		}
	}
	if got := m.Mean(); math.Abs(got-5.75) > 1e-12 {
		t.Errorf("mean %g, want 5.75", got)
	}
	for p, want := range map[float64]int{0.1: 0, 0.25: 0, 0.26: 3, 0.5: 3, 0.51: 10, 1: 10} {
		if got := m.Quantile(p); got != want {
			t.Errorf("quantile %g: %d, want %d", p, got, want)
		}
	}
	if got := Counted([]int{7, 3, 7}, []float64{1, 1, 2}); got.From != 3 || len(got.P) != 5 || got.P[0] != 0.25 || got.P[4] != 0.75 {
		t.Errorf("counted: %+v", got)
	}
}

func BenchmarkPlus(b *testing.B) {
	r := rand.New(rand.NewPCG(1, 2))
	n := Need{P: make([]float64, 400)}
	for k := range n.P {
		n.P[k] = r.Float64() / 400
	}
	for b.Loop() {
		n.Plus(n)
	}
}
