package pages

import (
	"fmt"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// whatIf shows what each decision of the plan is worth.
type whatIf struct {
	f    *Frame
	card *look.CardBox
	list *scrolled
	of   []plan.Decision // that are shown
}

func newWhatIf(f *Frame) *whatIf {
	w := &whatIf{f: f, list: newScrolled()}
	w.card = look.Card(say.T("What if?"), w.list.scroll)
	w.card.Hide()
	return w
}

// side is what stands beside the plan: why a count, or what if. A button in
// the head of each leads to the other.
func (p *dockings) side() fyne.CanvasObject {
	stack := container.NewStack(p.why.card, p.whatIf.card)
	turn := func(to, from *look.CardBox) func() {
		return func() {
			from.Hide()
			to.Show()
			p.update()
			stack.Refresh()
		}
	}
	p.why.card.SetExtra(look.QuietButton(say.T("What if?"), turn(p.whatIf.card, p.why.card)))
	p.whatIf.card.SetExtra(look.QuietButton(say.T("Why?"), turn(p.why.card, p.whatIf.card)))
	return stack
}

// update shows the decisions of the newest plan, if any are to be seen.
func (w *whatIf) update() {
	if !w.card.Visible() {
		return // they are only computed where someone looks
	}
	all, known := w.f.s.Decisions()
	switch {
	case !known:
		w.card.SetTitle(say.T("What if? computing…"))
		return
	case len(all) == 0:
		w.list.set(look.Note(say.T("There is no plan whose decisions could be weighed: a zone cannot be held, or no docking lies ahead.")))
	case len(w.of) == 0 || &w.of[0] != &all[0]:
		w.list.set(decisionLines(all, w.f.s.Asset().Currency)...)
	}
	w.of = all
	w.card.SetTitle(say.T("What if?"))
}

// decisionLines shows decisions by topic, each with its difference.
func decisionLines(all []plan.Decision, currency string) []fyne.CanvasObject {
	var lines []fyne.CanvasObject
	topic := plan.Topic("")
	for _, d := range all {
		if d.Topic != topic {
			if topic != "" {
				lines = append(lines, lift(4))
			}
			topic = d.Topic
			lines = append(lines, look.Lead(topicText(topic)))
		}
		if math.IsNaN(d.Difference) {
			lines = append(lines, look.Note("– "+say.Sentence(d.Text)))
			continue
		}
		lines = append(lines, look.Accented(fmt.Sprintf("%s %s", signed(d.Difference), currency)), look.Note(say.Sentence(d.Text)))
	}
	return lines
}

// topicText is the head of a topic.
func topicText(t plan.Topic) string {
	switch t {
	case plan.NextBest:
		return say.T("Next-best plans, within 3 %")
	case plan.FewerTimes:
		return say.T("Fewer dockings")
	case plan.Patterns:
		return say.T("Fewer patterns")
	case plan.Regret:
		return say.T("If it comes otherwise: regret of the first order")
	case plan.Confidence:
		return say.T("Price of confidence")
	case plan.Before:
		return say.T("Last time")
	}
	return session.Words(t)
}
