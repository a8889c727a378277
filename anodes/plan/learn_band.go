package plan

// Band returns the forecast of a zone at both ends of the 90 % range of its
// demand factor, by the readings where the plan uses them: the courses that
// the true one lies between with 90 %. Their samples are those of
// [Outcome.Course], one by one.
func (o *Outcome) Band(zone int) (low, high []Sample) {
	f := o.Before()
	if l := o.Zones[zone].Learned; l != nil && o.Learns {
		f = l.Factor
	}
	at := func(theta float64) []Sample {
		b := o.bare(theta)
		b.Learns = o.Learns
		b.Schedule = o.Schedule
		return b.Course(zone)
	}
	return at(f.Low), at(f.High)
}
