package grid

import "strings"

// Copy returns the text of the selected cell, or the whole table if all is
// selected.
func (g *Grid) Copy() string {
	if g.all {
		return g.CopyAll()
	}
	return flat(g.editText(g.row, g.col))
}

// CopyAll returns the whole table as tab-separated text, its first line the
// titles with their units.
func (g *Grid) CopyAll() string {
	var b strings.Builder
	for i, c := range g.cols {
		if i > 0 {
			b.WriteByte('\t')
		}
		b.WriteString(flat(c.Title))
		if c.Unit != "" {
			b.WriteString(" [" + flat(c.Unit) + "]")
		}
	}
	b.WriteByte('\n')
	for row := range g.src.Rows() {
		for col := range g.cols {
			if col > 0 {
				b.WriteByte('\t')
			}
			text := g.editText(row, col)
			if text == "" {
				text = g.src.Cell(row, col).State
			}
			b.WriteString(flat(text))
		}
		b.WriteByte('\n')
	}
	return b.String()
}

// flat makes a text fit for one field of tab-separated text.
func flat(s string) string {
	return strings.NewReplacer("\t", " ", "\r\n", " ", "\n", " ", "\r", " ").Replace(s)
}

// Paste commits a block of tab-separated text, row by row, beginning at the
// selected cell. What lies beyond the last column, or on columns that cannot be
// edited, is left out; for rows beyond the last one OnPasteRows is asked.
func (g *Grid) Paste(text string) {
	block := parseBlock(text)
	if g.row < 0 || len(block) == 0 {
		return
	}
	if g.OnPaste != nil && g.OnPaste(g.row, g.col, block) {
		g.Refresh()
		return
	}
	row, col := g.row, g.col
	if more := row + len(block) - g.src.Rows(); more > 0 && g.OnPasteRows != nil {
		g.OnPasteRows(more)
	}
	for i, fields := range block {
		for j, field := range fields {
			if row+i < g.src.Rows() && col+j < len(g.cols) && g.cols[col+j].Edit {
				g.src.Commit(row+i, col+j, field)
			}
		}
	}
	g.Refresh()
}

// parseBlock splits tab-separated text into rows of fields.
func parseBlock(text string) [][]string {
	text = strings.ReplaceAll(text, "\r\n", "\n")
	text = strings.ReplaceAll(text, "\r", "\n")
	text = strings.TrimSuffix(text, "\n")
	if text == "" {
		return nil
	}
	var block [][]string
	for line := range strings.SplitSeq(text, "\n") {
		fields := strings.Split(line, "\t")
		for i := range fields {
			fields[i] = strings.TrimSpace(fields[i])
		}
		block = append(block, fields)
	}
	return block
}
