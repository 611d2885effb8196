package catalog

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"
)

// Parsed is what the line to put things in understood: a wire (Type, Size, Metal, Class, and Wire where one is listed), a holder, or
// a rod.
type Parsed struct {
	Count    int     // "3x 12 thhn": 3
	Wire     string  // finished wire id, "" if none
	Holder   string  // holder id, "" if none
	Size     string  // conductor size, with Type
	Metal    string  // of the conductor
	Class    string  // of the conductor
	Type     string  // wire type id
	RodMM    float64 // "filler 4": diameter
	Material string  // of a rod or hose
	Hose     bool    // the rod is a hose
	BoreMM   float64 // of a hose: "hose 8/5", else the usual one, which Meant says
	Meant    string  // how it was understood, for people: "3 × 12 AWG THHN, ⌀ 3.30 mm"
}

// mostAtOnce is the largest count: a section holds 500 parts.
const mostAtOnce = 500

const examples = `write for example "3x 12 thhn", "2.5 h07v-k", "emt 1" or "filler 4"`

var (
	commaInNumber = regexp.MustCompile(`(\d),(\d)`)
	timesBetween  = regexp.MustCompile(`(\d) ?x ?(\d)`)
	counted       = regexp.MustCompile(`^(\d+) ?x ?((?:\d|#).*)$|^(\d+) ?x (.+)$`)
	multicore     = regexp.MustCompile(`^\d+ ?g ?\d|^\d+x\d+x\d`)
)

// Parse reads what a person typed into the line: "12 thhn", "3x 2.5 h07v-k", "emt 1", "filler 4". The error says in one sentence what
// was not understood and gives an example.
func (c *Catalog) Parse(text string) (Parsed, error) {
	s := plainText(text)
	switch {
	case s == "":
		return Parsed{}, fmt.Errorf("nothing is written; %s", examples)
	case len(s) > 200:
		return Parsed{}, fmt.Errorf("this is too long to be one thing; %s", examples)
	case multicore.MatchString(s):
		return Parsed{}, fmt.Errorf(`%q is a cable of several cores, which is put together under builds in the file; here write its single wires, for example "4x 1.5 h07v-k"`, strings.TrimSpace(text))
	}
	if h, ok := c.holderNamed(s); ok {
		return Parsed{Count: 1, Holder: h.ID, Meant: h.meant()}, nil
	}
	if twoNumbers.MatchString(s) {
		return Parsed{}, c.holderMissed(s)
	}
	count, rest, err := c.counted(s)
	if err != nil {
		return Parsed{}, err
	}
	p, err := c.parseThing(rest)
	if err != nil {
		return Parsed{}, err
	}
	p.Count = count
	if count > 1 {
		p.Meant = fmt.Sprintf("%d × %s", count, p.Meant)
	}
	return p, nil
}

// counted takes the count off the front; without one it is 1.
func (c *Catalog) counted(s string) (count int, rest string, err error) {
	m := counted.FindStringSubmatch(s)
	if m == nil {
		return 1, s, nil
	}
	number, rest := m[1]+m[3], m[2]+m[4]
	count, err = strconv.Atoi(number)
	if err != nil || count < 1 || count > mostAtOnce {
		return 0, "", fmt.Errorf("%s things at once are not possible; write a count from 1 to %d", number, mostAtOnce)
	}
	if _, ok := c.holderNamed(rest); ok {
		return 0, "", fmt.Errorf("a section has one holder; write %q without a count", rest)
	}
	return count, rest, nil
}

func (c *Catalog) parseThing(s string) (Parsed, error) {
	words := strings.Fields(s)
	if rodWord(words) >= 0 {
		return c.parseRod(words)
	}
	if err := c.holderMissed(s); err != nil {
		return Parsed{}, err
	}
	return c.parseWire(words)
}

// plainText is what was typed in small letters with single spaces, decimal points and a plain x between numbers.
func plainText(s string) string {
	s = strings.ToLower(s)
	s = strings.NewReplacer("×", "x", "*", "x", "⌀", " ", "ø", " ", "″", `"`, "”", `"`, "“", `"`, "''", `"`,
		"–", "-", "−", "-", "‑", "-", "²", "2", "\u00a0", " ", "\u2009", " ", "\u202f", " ", "½", " 1/2", "¼", " 1/4", "¾", " 3/4").Replace(s)
	s = strings.Join(strings.Fields(s), " ")
	s = commaInNumber.ReplaceAllString(s, "$1.$2")
	return timesBetween.ReplaceAllString(s, "${1}x$2")
}

// squash leaves only letters and digits, so that h07vk, h07v k and h07v-k are the same.
func squash(s string) string {
	return strings.Map(func(r rune) rune {
		if r >= 'a' && r <= 'z' || r >= '0' && r <= '9' {
			return r
		}
		return -1
	}, strings.ToLower(s))
}

// permutations calls yield with every order of up to four words until it returns true.
func permutations(words []string, yield func([]string) bool) bool {
	if len(words) > 4 {
		return yield(words)
	}
	var try func(k int) bool
	words = append([]string(nil), words...)
	try = func(k int) bool {
		if k == len(words) {
			return yield(words)
		}
		for i := k; i < len(words); i++ {
			words[k], words[i] = words[i], words[k]
			if try(k + 1) {
				return true
			}
			words[k], words[i] = words[i], words[k]
		}
		return false
	}
	return try(0)
}
