package catalog

import (
	"cmp"
	"fmt"
	"math"
	"regexp"
	"slices"
	"strings"

	"packrise/solver/quantity"
)

var (
	lengthUnits = regexp.MustCompile(`("|\b(?:in|inch|inches|mm)\b)`)
	twoNumbers  = regexp.MustCompile(`^[\d.]+x[\d.]+$`)
	metricTrade = regexp.MustCompile(`\b(?:m|conduit) (\d\d)\b`)
	schedule    = regexp.MustCompile(`\bpvc (?:schedule |sch )?([48]0)\b,?`)
	metricName  = regexp.MustCompile(`^m\d+$`)
	sidesOfID   = regexp.MustCompile(`-([\d.]+x[\d.]+)$`)
)

// bareFirst are the families that a bare "100x50" is looked for in, the first that has it.
var bareFirst = []string{"trunking-", "wireway-", "duct-", "trunking-pvc-"}

// Words that people add to a holder: the first add nothing, the others say what the wall is of.
var (
	idleWords = []string{"conduit", "slotted", "cable", "size"}
	wallWords = []string{"steel", "galvanised", "painted", "pvc"}
)

// holderWords are the words of a holder without units, "m 25" as one word.
func holderWords(s string) []string {
	s = schedule.ReplaceAllString(metricTrade.ReplaceAllString(s, "m$1"), "pvc$1 ")
	return strings.Fields(lengthUnits.ReplaceAllString(s, " "))
}

// holderNamed finds a holder by its id with the words in any order: "emt 1", "1 in emt", "m 25", "4x4 wireway", "100x50".
func (c *Catalog) holderNamed(s string) (Holder, bool) {
	words := holderWords(s)
	if h, ok := c.holderOf(words); ok {
		return h, true
	}
	words = slices.DeleteFunc(words, func(w string) bool { return slices.Contains(idleWords, w) })
	if h, ok := c.holderOf(words); ok {
		return h, true
	}
	var walls []string
	words = slices.DeleteFunc(words, func(w string) bool {
		isWall := slices.Contains(wallWords, w)
		if isWall {
			walls = append(walls, w)
		}
		return isWall
	})
	h, ok := c.holderOf(words)
	for _, w := range walls {
		ok = ok && strings.Contains(h.Wall, w)
	}
	return h, ok
}

func (c *Catalog) holderOf(words []string) (found Holder, ok bool) {
	if len(words) == 1 && twoNumbers.MatchString(words[0]) {
		for _, family := range bareFirst {
			if h, ok := c.Holder(family + words[0]); ok {
				return h, true
			}
		}
	}
	ok = permutations(words, func(w []string) (ok bool) {
		found, ok = c.Holder(strings.Join(w, "-"))
		return ok
	})
	return found, ok
}

// holderMissed tells whether the words mean a holder that the catalogue lacks, and says so.
func (c *Catalog) holderMissed(s string) error {
	words := holderWords(s)
	if len(words) == 1 && twoNumbers.MatchString(words[0]) {
		count, size, _ := strings.Cut(words[0], "x")
		return fmt.Errorf("there is no holder of %s in the catalogue, %s; for wires name the type as well, for example %q",
			words[0], nearestAre(c.nearSides("", words[0], 2)), count+"x "+size+" "+c.typeFor(size))
	}
	i := slices.IndexFunc(words, c.holderFamily)
	if i < 0 {
		return nil
	}
	family := words[i]
	near := c.Nearest("holder", strings.Join(append([]string{family}, slices.Delete(slices.Clone(words), i, i+1)...), "-"), 3)
	if k := slices.IndexFunc(words, twoNumbers.MatchString); k >= 0 {
		near = c.nearSides(family+"-", words[k], 3)
	}
	if len(near) == 0 {
		near = c.ofFamily(family, 3)
	}
	return fmt.Errorf("there is no %q in the catalogue; %s", s, nearestAre(near))
}

// typeFor is a wire type that a bare size fits, for examples.
func (c *Catalog) typeFor(size string) string {
	if _, ok := c.conductors.get(conductorID(size+" mm2", "copper", Flexible)); ok {
		return "h07v-k"
	}
	return "thhn"
}

// holderFamily tells whether a word begins the ids of holders.
func (c *Catalog) holderFamily(word string) bool {
	return metricName.MatchString(word) || slices.ContainsFunc(c.holders.order, func(id string) bool { return strings.HasPrefix(id, word+"-") })
}

// ofFamily returns the first holders of a family; every word that holderFamily knows has some.
func (c *Catalog) ofFamily(family string, n int) (ids []string) {
	metric := metricName.MatchString(family)
	for _, id := range c.holders.order {
		if len(ids) < n && (metric && metricName.MatchString(id) || strings.HasPrefix(id, family+"-")) {
			ids = append(ids, id)
		}
	}
	return ids
}

// nearSides returns the holders of a family whose sides are nearest to "50x100", either way round.
func (c *Catalog) nearSides(family, sides string, n int) []string {
	off := map[string]float64{}
	var ids []string
	w, h := sidesOf(sides)
	for _, id := range c.holders.order {
		m := sidesOfID.FindStringSubmatch(id)
		if m == nil || !strings.HasPrefix(id, family) {
			continue
		}
		a, b := sidesOf(m[1])
		off[id] = min(ratio(a, w)+ratio(b, h), 1e-3+ratio(a, h)+ratio(b, w))
		ids = append(ids, id)
	}
	slices.SortStableFunc(ids, func(a, b string) int { return cmp.Compare(off[a], off[b]) })
	return ids[:min(n, len(ids))]
}

func sidesOf(text string) (w, h float64) {
	a, b, _ := strings.Cut(text, "x")
	w, errW := quantity.ParseNumber(a)
	h, errH := quantity.ParseNumber(b)
	if errW != nil || errH != nil {
		return 1, 1
	}
	return w, h
}

// ratio is how far apart two lengths are, as the logarithm of their ratio.
func ratio(a, b float64) float64 { return math.Abs(math.Log(max(a, 1e-3) / max(b, 1e-3))) }

// meant describes a holder for people.
func (h Holder) meant() string {
	mm := func(m float64) string { return quantity.Fixed(m*1e3, 1) }
	if h.Kind == KindConduit {
		return fmt.Sprintf("%s, inside ⌀ %s mm", h.Name, mm(h.InsideM))
	}
	return fmt.Sprintf("%s, inside %s × %s mm", h.Name, mm(h.WidthM), mm(h.HeightM))
}
