package renewal

import (
	"crypto/sha256"
	"encoding/json"
	"fmt"
	"sync"

	"anodewright/hull"
)

// Memo keeps the ways of zones between plans, so that after an edit only the
// zones are listed anew that it touches. Whoever plans one asset again and
// again holds one; it may be used by several plans at once. The zero Memo is
// empty and ready.
type Memo struct {
	mu    sync.Mutex
	known map[string]*kept
	turn  int
}

// remembered is what a zone's key stands for. It is not changed.
type remembered struct {
	options
	all, late []stock // of the simple rules; nil where they cannot be followed
}

// kept is what is remembered, and the plan that used it last.
type kept struct {
	*remembered
	turn int
}

// remember makes what a zone's key will stand for.
func (z *zone) remember(o options) *remembered {
	own := *z
	o.z = &own
	q := newQuick(&o)
	o.quick = &q
	r := &remembered{options: o}
	r.all, _ = z.renewAll()
	r.late, _ = z.asLate()
	return r
}

// keepTurns is for how many plans a zone that none of them has is kept, so
// that an edit taken back finds it.
const keepTurns = 50

// begin starts a plan and forgets what long ago was used last.
func (m *Memo) begin() {
	m.mu.Lock()
	defer m.mu.Unlock()
	if m.known == nil {
		m.known = map[string]*kept{}
	}
	m.turn++
	for key, k := range m.known {
		if m.turn-k.turn > keepTurns {
			delete(m.known, key)
		}
	}
}

func (m *Memo) get(key string) *remembered {
	m.mu.Lock()
	defer m.mu.Unlock()
	k := m.known[key]
	if k == nil {
		return nil
	}
	k.turn = m.turn
	return k.remembered
}

func (m *Memo) put(key string, r *remembered) {
	m.mu.Lock()
	defer m.mu.Unlock()
	m.known[key] = &kept{r, m.turn}
}

// common is what the ways of every zone of the problem depend on, as text.
func (p *Problem) common() string {
	a := *p.Asset
	a.Zones = nil
	sum := sha256.Sum256(fmt.Append(encoded(&a), p.Asset.Start(), p.Limits, p.Quay != nil, p.Only))
	return string(sum[:])
}

// key is all that the ways of a zone depend on beside that, as text.
func (p *Problem) key(common string, zone int) string {
	numbers := make([]float64, 0, 3*len(p.Demand[zone])+1)
	for _, d := range p.Demand[zone] {
		numbers = append(numbers, d.Initial, d.Mean, d.Final)
	}
	return common + string(encoded(&p.Asset.Zones[zone])) + bits(append(numbers, p.Factors[zone]))
}

// encoded writes a part of an asset. A valid asset has no number that cannot
// be written.
func encoded(v any) []byte {
	text, err := json.Marshal(v)
	if err != nil {
		panic("renewal: " + err.Error())
	}
	return text
}

// again makes a remembered zone one of this asset.
func (r *remembered) again(a *hull.Asset, zone int) *remembered {
	z := *r.z
	z.a, z.index, z.z, z.ahead = a, zone, &a.Zones[zone], a.Ahead()
	o := *r
	o.z = &z
	z.remembered = &o
	return &o
}
