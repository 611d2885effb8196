package catalog

import "strings"

// Source says where a row's numbers come from.
type Source struct {
	Text       string // standard or handbook, edition, clause or table
	FromMemory bool   // recalled, not seen
	Note       string // disagreements, roundings, extrapolation
}

// String returns the source on one line for people.
func (s Source) String() string {
	text := s.Text
	if s.FromMemory {
		text += " (from memory)"
	}
	if s.Note != "" {
		text += "; " + s.Note
	}
	return text
}

type sourceRow struct {
	Standard   string `yaml:"standard,omitempty"`
	Edition    string `yaml:"edition,omitempty"`
	Clause     string `yaml:"clause,omitempty"`
	FromMemory bool   `yaml:"from_memory,omitempty"`
	Note       string `yaml:"note,omitempty"`
}

func (r sourceRow) source() Source {
	var words []string
	for _, w := range []string{r.Standard, r.Edition, r.Clause} {
		if w != "" {
			words = append(words, w)
		}
	}
	return Source{Text: strings.Join(words, ", "), FromMemory: r.FromMemory, Note: r.Note}
}

// noting returns the source with one more note.
func (r sourceRow) noting(note string) sourceRow {
	if r.Note != "" {
		note = r.Note + "; " + note
	}
	r.Note = note
	return r
}
