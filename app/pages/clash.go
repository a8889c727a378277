package pages

import (
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// showClash shows both versions of an asset that two programs changed, to
// choose one. Cancelled, theirs is shown and the question stays open.
func (f *Frame) showClash(c *session.Clash) {
	title := say.T("Two versions of %s", c.Name)
	resolve := func(l *listDialog, choice session.Choice) func() {
		return func() {
			l.close()
			f.report(f.s.Resolve(c, choice))
			f.Update()
		}
	}
	if c.Removed {
		note := say.T("%s took it out of the fleet on %s, while you changed it here: %s. Your version is kept until you choose.", c.Who, moment(c.When), say.Sentence(c.What))
		l := newListDialog(f, title, note, []grid.Column{{Title: say.T("What you can do"), Width: 300, Fill: true}},
			listed{{{Text: say.T("Leave it removed: its history stays in the register")}}, {{Text: say.T("Bring it back with your change")}}})
		l.show(look.Button(say.T("Cancel"), l.close), look.Button(say.T("Leave it removed"), resolve(l, session.Theirs)), look.AccentButton(say.T("Bring mine back"), resolve(l, session.Mine)))
		return
	}
	var rows listed
	for _, d := range c.Differences {
		where := d.Item
		if where == "" {
			where = say.T("the asset")
		}
		rows = append(rows, []grid.Cell{
			{Text: where}, {Text: d.Field, Bold: true}, {Text: d.Before, Muted: true},
			{Text: d.Theirs, Accent: d.Theirs != d.Before}, {Text: d.Mine, Accent: d.Mine != d.Before},
		})
	}
	note := say.T("%s stored a change on %s while you made yours here: %s. Theirs is stored and stays in the history whatever you choose; yours is kept until you choose, also if you cancel now: Register ▸ Two versions of an asset. What each changed is tinted.", c.Who, moment(c.When), say.Sentence(c.What))
	l := newListDialog(f, title, note, []grid.Column{
		{Title: say.T("Where"), Width: 150},
		{Title: say.T("Field"), Width: 150, Fill: true},
		{Title: say.T("Before"), Width: 130, Fill: true},
		{Title: say.T("Theirs"), Width: 130, Fill: true},
		{Title: say.T("Mine"), Width: 130, Fill: true},
	}, rows)
	buttons := []*look.PushButton{
		look.Button(say.T("Cancel"), l.close), look.Button(say.T("Keep theirs"), resolve(l, session.Theirs)), look.Button(say.T("Keep mine"), resolve(l, session.Mine)),
	}
	if c.CanBoth {
		buttons = append(buttons, look.AccentButton(say.T("Theirs with my change"), resolve(l, session.Both)))
	}
	l.show(buttons...)
}

// pendingClash shows the clash that is not decided on.
func (f *Frame) pendingClash() {
	if c := f.s.Clash(); c != nil {
		f.showClash(c)
		return
	}
	f.tell(say.T("Nothing to decide"), say.T("No asset has two versions. When another program changes an asset while you change it here, both are shown and you choose."))
}
