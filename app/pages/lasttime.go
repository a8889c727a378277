package pages

import (
	"fmt"
	"math"
	"strings"

	"fyne.io/fyne/v2"

	"anodewright/anodes/plan"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// lastTime stands beside the order: what was ordered last time, what is left of
// it, what the same order would cost again, and the regret if the docking
// slips.
type lastTime struct {
	f    *Frame
	list *scrolled
	text string // what is shown, to see when it changes
}

func newLastTime(f *Frame) *lastTime {
	return &lastTime{f: f, list: newScrolled()}
}

// update shows the newest look back, if it is to be seen.
func (l *lastTime) update() {
	if !l.list.scroll.Visible() {
		return // it is only computed where someone looks
	}
	last, known := l.f.s.LastTime()
	decisions, decided := l.f.s.Decisions()
	switch {
	case !known:
		l.set(look.Note(say.T("looking back…")))
	case last == nil:
		l.set(look.Note(say.T("Nothing is known of last time, or no docking lies ahead. Once a docking is closed on Dock floor, what was ordered, put on and left stands here, with what the same order would cost again.")))
	default:
		lines := lastTimeLines(l.f.s.Asset(), last)
		if !decided {
			lines = append(lines, look.Note(say.T("weighing what comes if the docking slips…")))
		}
		l.set(append(lines, slipLines(decisions, l.f.s.Asset().Currency)...)...)
	}
}

// set shows lines where they have changed.
func (l *lastTime) set(lines ...fyne.CanvasObject) {
	var all []string
	for _, o := range lines {
		switch o := o.(type) {
		case *look.Paragraph:
			all = append(all, o.Text())
		case *look.Text:
			all = append(all, o.String())
		}
	}
	if text := strings.Join(all, "\n"); text != l.text {
		l.text = text
		l.list.set(lines...)
	}
}

// stocks writes pieces by pattern: 24 × al-45, 6 × zn-7.
func stocks(all []hull.Stock) string {
	var parts []string
	for _, s := range all {
		parts = append(parts, fmt.Sprintf("%d × %s", s.Count, s.Pattern))
	}
	return strings.Join(parts, ", ")
}

func lastTimeLines(a *hull.Asset, l *session.LastTime) (lines []fyne.CanvasObject) {
	add := func(o ...fyne.CanvasObject) { lines = append(lines, o...) }
	day := session.Day(l.Date)
	put := 0
	for _, p := range l.PutOn {
		put += p.Count
	}
	add(look.Lead(say.T("Last time, on %s", day)))
	switch {
	case l.Known:
		add(look.Body(say.T("Ordered: %s. Put on: %d pieces.", stocks(l.Ordered), put)))
	case len(l.Ordered) > 0:
		add(look.Body(say.T("Put on: %s. What was ordered is not known: the docking was not closed here.", stocks(l.Ordered))))
	default:
		add(look.Body(say.T("No anodes were put on.")))
	}
	if !math.IsNaN(l.Left) {
		add(look.Body(say.T("On %s, by the forecast, %s of their metal will be left.", session.Day(l.Next.Date), session.Percent(l.Left))))
	}
	add(againLines(a, l)...)
	if l.Closed != nil {
		add(lift(4), look.Lead(say.T("Planned and found")))
		for _, text := range l.Closed.Words() {
			add(look.Body("• " + say.Sentence(text)))
		}
	}
	return lines
}

// againLines say what the same order would cost against this plan's.
func againLines(a *hull.Asset, l *session.LastTime) (lines []fyne.CanvasObject) {
	if len(l.Ordered) == 0 {
		return nil
	}
	kg := func(x float64) string { return session.ShownWith(say.Mass, x, 0) }
	lines = append(lines, lift(4), look.Lead(say.T("The same order again for %s", session.Day(l.Next.Date))))
	text := say.T("It would cost %s %s for %s of metal; this plan buys %s for %s %s.", session.Figure(l.Again, 0), a.Currency, kg(l.AgainMass), kg(l.PlannedMass), session.Figure(l.Planned, 0), a.Currency)
	switch saved := l.Again - l.Planned; {
	case saved > 0.5:
		lines = append(lines, look.Accented(say.T("this plan saves %s %s on this order", session.Figure(saved, 0), a.Currency)))
	case saved < -0.5:
		lines = append(lines, look.Accented(say.T("this plan spends %s %s more on this order", session.Figure(-saved, 0), a.Currency)))
	}
	lines = append(lines, look.Body(text))
	for i, r := range l.Refused {
		if i == 3 {
			lines = append(lines, look.Note(say.T("and %d more", len(l.Refused)-i)))
			break
		}
		lines = append(lines, look.Wrong("⚠ "+say.T("The same pieces would not do for %s: %s.", r.Zone, say.Sentence(r.Why))))
	}
	switch {
	case math.IsNaN(l.Over):
	case l.Over > 0.5:
		lines = append(lines, look.Body(say.T("Over all dockings to come, where it does, it would cost %s %s more than this plan, fitting and removal among it.", session.Figure(l.Over, 0), a.Currency)))
	default:
		lines = append(lines, look.Body(say.T("Over all dockings to come it would cost as much as this plan.")))
	}
	return lines
}

// slipLines say what comes if the next docking slips.
func slipLines(all []plan.Decision, currency string) (lines []fyne.CanvasObject) {
	for _, d := range all {
		if d.Topic != plan.Regret || !strings.HasPrefix(d.Text, "next docking six months later") {
			continue
		}
		lines = append(lines, lift(4), look.Lead(say.T("If the docking slips: regret of this order")))
		if !math.IsNaN(d.Difference) {
			lines = append(lines, look.Accented(fmt.Sprintf("%s %s", signed(d.Difference), currency)))
		}
		lines = append(lines, look.Body(say.Sentence(d.Text)))
	}
	return lines
}
