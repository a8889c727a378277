package pages

import (
	"slices"
	"testing"
	"time"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
)

// BenchmarkDragRedraw drags the cursor of the date strip over the demo ship,
// with each page open that has figures of the day: the figures, the strip and
// the picture's pixels, without the painting by the graphics card.
func BenchmarkDragRedraw(b *testing.B) {
	for _, page := range []int{0, 1, 3} {
		f := shown(b, look.Light, 1, fyne.NewSize(1920, 1055), fleet()[0])
		f.show(page)
		b.Run(f.pages[page].title(), func(b *testing.B) {
			var took []time.Duration
			size := f.band.view.Size()
			for i := 0; b.Loop(); i++ {
				begin := time.Now()
				f.band.strip.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(float32(100+i*7%1400), 10)}})
				f.band.view.pixels(int(size.Width), int(size.Height))
				took = append(took, time.Since(begin))
			}
			slices.Sort(took)
			for share, name := range map[int]string{50: "p50-ms", 99: "p99-ms"} {
				b.ReportMetric(float64(took[len(took)*share/100].Microseconds())/1000, name)
			}
		})
	}
}
