package workbook

import (
	"fmt"

	"github.com/xuri/excelize/v2"
)

// mostCharted is how many zones are drawn; the tables have all.
const mostCharted = 12

// charts draws wastage by zone, and demand against output for every zone with
// anodes of its own.
func (b *book) charts() {
	s := b.sheet("Charts", "charts", chartColumns)
	zones := b.cells.wastage.zones
	note := "Wastage and output as forecast, demand as calculated, from the sheets Forecast and Demand."
	if len(zones) > mostCharted {
		note += fmt.Sprintf(" The first %d of %d zones with anodes are drawn.", mostCharted, len(zones))
		zones = zones[:mostCharted]
	}
	s.line(lead, note)
	const demand, output = "Final demand, with the zones held and the demand factor", "Output of the anodes"
	for c := range s.widths {
		s.widths[c] = 13
	}
	// The names of the series.
	s.across(0, chartColumns/2-1, s.next, demand, label)
	s.across(chartColumns/2, chartColumns-1, s.next, output, label)
	s.next++
	if len(zones) == 0 {
		s.line(lead, "No zone has anodes of its own.")
	} else {
		s.wastageChart(len(zones))
		for k, i := range zones {
			if k%2 == 0 {
				s.parts = append(s.parts, s.next+chartRows*(1+k/2))
			}
			s.currentChart(k, i)
		}
		s.next += chartRows*(1+(len(zones)+1)/2) + 1
	}
	s.finish(page{frozenRows: 1, firstTitle: 1, lastTitle: 1})
}

// chartRows is the height of a chart in rows, chartColumns the width of two.
const chartRows, chartColumns = 18, 16

// seriesColours tell intervals and currents apart, dark to light.
var seriesColours = []string{"0F5C6E", "C77C11", "7A4B82", "5A8F3C", "A4262C", "3D6FA5", "8A6D3B", "5A646F"}

func (s *sheet) wastageChart(zones int) {
	w := s.cells.wastage
	last := w.first + zones - 1
	var series []excelize.ChartSeries
	for k := range s.o.Intervals {
		column := absolute(1+k, w.first) + ":" + absolute(1+k, last)
		series = append(series, excelize.ChartSeries{
			Name: "Forecast!" + absolute(1+k, w.head), Categories: "Forecast!" + absolute(0, w.first) + ":" + absolute(0, last),
			Values: "Forecast!" + column, Fill: solid(k),
		})
	}
	s.chart(0, s.next, 1080, "Wastage by zone, before each docking", "share of the net mass", "0%", series)
}

// currentChart draws one zone, two in a row.
func (s *sheet) currentChart(k, zone int) {
	last := len(s.o.Intervals) - 1
	need := s.cells.calc.intervals[zone]
	row := s.cells.demand[zone]
	dates := "Forecast!" + absolute(1, s.cells.wastage.head) + ":" + absolute(1+last, s.cells.wastage.head)
	const output = 22 // column of the sheet Demand
	series := []excelize.ChartSeries{
		{Name: s.name + "!" + absolute(0, s.next-1), Categories: dates, Values: cellsFrom(need[0].need[2], need[last].need[2]).at, Fill: solid(0)},
		{Name: s.name + "!" + absolute(chartColumns/2, s.next-1), Categories: dates, Values: "Demand!" + absolute(output, row) + ":" + absolute(output, row+last), Fill: solid(1)},
	}
	s.chart(chartColumns/2*(k%2), s.next+chartRows*(1+k/2), 520, s.names[zone]+": at the end of each interval", "A", "#,##0.0", series)
}

func (s *sheet) chart(col, row int, width uint, name, unit, format string, series []excelize.ChartSeries) {
	vary := false
	dark := excelize.Font{Color: ink, Size: 9, Family: fontName}
	bold := dark
	bold.Bold = true
	drawn := &excelize.Chart{
		Type: excelize.Col, Series: series, VaryColors: &vary, Title: excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: clean(name), Font: &bold}}},
		Dimension: excelize.ChartDimension{Width: width, Height: uint(chartRows*rowHeight*96/72) - 12},
		Legend:    excelize.ChartLegend{Position: "bottom"},
		XAxis:     excelize.ChartAxis{Font: dark},
		YAxis: excelize.ChartAxis{
			Font: dark, MajorGridLines: true, Title: excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: unit, Font: &dark}}},
			NumFmt: excelize.ChartNumFmt{CustomNumFmt: format},
		},
	}
	if testOnlyDrawn != nil {
		testOnlyDrawn(s.name, at(col, row), drawn)
	}
	s.check(s.f.AddChart(s.name, at(col, row), drawn))
}

// testOnlyDrawn is told of every chart, so that a benchmark can draw the same.
var testOnlyDrawn func(sheet, cell string, c *excelize.Chart)

func solid(k int) excelize.Fill {
	return excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{seriesColours[k%len(seriesColours)]}}
}
