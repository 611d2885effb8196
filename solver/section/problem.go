package section

import "fmt"

// Severity tells whether a problem stops the work.
type Severity int

// Severities.
const (
	Refused Severity = iota // the section can't be used until this is mended
	Warned                  // it can, and the person should know
)

// Problem is one thing that is wrong with a design, of form (found by Read) or of substance (found by rating.Resolve).
type Problem struct {
	Rule     string   // a constant name for the rule, such as "overlap" or "unknown-key"
	Severity Severity // Refused unless said
	IDs      []string // the parts, loads or builds concerned, most concerned first
	Key      string   // the key concerned, such as "layers[0].thickness_mm", "" if none
	Line     int      // in the file, from 1; 0 when the document did not come from a file
	What     string   // what is wrong, with ids and numbers, no full stop
	Do       string   // what to write or do instead, no full stop
}

// Sentence returns the problem as one line for people.
func (p Problem) Sentence() string {
	if p.Do == "" {
		return p.What
	}
	return fmt.Sprintf("%s; %s", p.What, p.Do)
}

// At returns "file:line: sentence" for a list of problems on a terminal.
func (p Problem) At(file string) string {
	if p.Line > 0 {
		return fmt.Sprintf("%s:%d: %s", file, p.Line, p.Sentence())
	}
	return fmt.Sprintf("%s: %s", file, p.Sentence())
}
