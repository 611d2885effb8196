package ui

import (
	"strings"
	"unicode/utf8"

	"fyne.io/fyne/v2"
)

// proseLeading is the space between two lines of prose.
const proseLeading = 4

// proseEntryWidth is the least width of an entry within prose.
const proseEntryWidth = 110

// proseLay lays words out in lines.
type proseLay struct {
	p      *prose
	size   float32
	line   float32 // height of a line of text
	x, y   float32
	tall   float32 // height of the line under way
	first  int     // its first piece
	pieces []piece
}

// layOut breaks the runs into lines of the width. Words break at spaces; a word wider than a line breaks where it must.
func (p *prose) layOut() {
	l := &proseLay{p: p, size: p.textSize()}
	l.line = textExtent("Mg", l.size, fyne.TextStyle{}).Height
	l.tall = l.line
	for i, r := range p.runs {
		if i == p.editing && p.entry != nil {
			l.entry(i)
			continue
		}
		l.words(i, r.text, r.tone.style())
	}
	if p.message != "" {
		l.newLine()
		l.words(-1, p.message, fyne.TextStyle{})
	}
	l.endLine()
	p.pieces, p.height = l.pieces, l.y+l.tall
	if p.pieces == nil {
		p.pieces = []piece{}
	}
}

// entry keeps room for the entry that stands in the place of a run.
func (l *proseLay) entry(i int) {
	s := l.p.entry.MinSize()
	s.Width = min(max(proseEntryWidth, textExtent(l.p.entry.Text, l.size, fyne.TextStyle{}).Width+44), max(l.p.width, 40))
	if l.x+s.Width > l.p.width {
		l.newLine()
	}
	l.put(piece{run: i, size: s})
}

// words puts a text, word by word. Words of one run and line are one piece.
func (l *proseLay) words(run int, text string, style fyne.TextStyle) {
	for text != "" {
		word := text
		if n := strings.IndexAny(text[1:], " \n"); n >= 0 {
			word = text[:n+1]
		}
		text = text[len(word):]
		if word[0] == '\n' {
			l.newLine()
			word = word[1:]
		}
		l.word(run, word, style)
	}
}

// word puts one word, which may begin with the space before it.
func (l *proseLay) word(run int, word string, style fyne.TextStyle) {
	if l.x == 0 {
		word = strings.TrimLeft(word, " ")
	}
	if word == "" {
		return
	}
	s := textExtent(word, l.size, style)
	if l.x+s.Width > l.p.width && l.x > 0 {
		if word[0] == ' ' || run < 0 {
			l.newLine()
			word = strings.TrimLeft(word, " ")
		} else {
			l.carry()
		}
		s = textExtent(word, l.size, style)
	}
	for s.Width > l.p.width-l.x && utf8.RuneCountInString(word) > 1 {
		head := l.fitting(word, style)
		l.put(piece{text: head, run: run, size: fyne.NewSize(textExtent(head, l.size, style).Width, s.Height)})
		l.newLine()
		word = word[len(head):]
		s = textExtent(word, l.size, style)
	}
	if last := len(l.pieces) - 1; last >= l.first && l.pieces[last].run == run && l.pieces[last].text != "" {
		w := &l.pieces[last]
		joined := w.text + word
		width := textExtent(joined, l.size, style).Width
		if w.at.X+width <= l.p.width {
			w.text, w.size.Width, l.x = joined, width, w.at.X+width
			return
		}
	}
	if lead := len(word) - len(strings.TrimLeft(word, " ")); lead > 0 {
		l.x += textExtent(word[:lead], l.size, style).Width
		word = word[lead:]
		s = textExtent(word, l.size, style)
	}
	if word != "" {
		l.put(piece{text: word, run: run, size: s})
	}
}

// fitting returns the longest beginning of a word that fits the line, at least one letter.
func (l *proseLay) fitting(word string, style fyne.TextStyle) string {
	end := 0
	for i, r := range word {
		next := i + utf8.RuneLen(r)
		if end > 0 && l.x+textExtent(word[:next], l.size, style).Width > l.p.width {
			break
		}
		end = next
	}
	return word[:end]
}

// carry takes what hangs on a word without a space, such as the input before its full stop, along to the next line.
func (l *proseLay) carry() {
	last := len(l.pieces) - 1
	if last <= l.first {
		l.newLine()
		return
	}
	w := l.pieces[last]
	head, tail := "", w.text
	if n := strings.LastIndex(w.text, " "); n >= 0 {
		head, tail = w.text[:n], w.text[n+1:]
	}
	style := fyne.TextStyle{}
	if w.run >= 0 {
		style = l.p.runs[w.run].tone.style()
	}
	l.pieces = l.pieces[:last]
	if head != "" {
		l.pieces = append(l.pieces, piece{text: head, run: w.run, at: w.at, size: textExtent(head, l.size, style)})
	}
	l.newLine()
	if w.text == "" { // an entry
		l.put(piece{run: w.run, size: w.size})
		return
	}
	l.put(piece{text: tail, run: w.run, size: textExtent(tail, l.size, style)})
}

func (l *proseLay) put(w piece) {
	w.at = fyne.NewPos(l.x, l.y)
	l.x += w.size.Width
	l.tall = max(l.tall, w.size.Height)
	l.pieces = append(l.pieces, w)
}

// endLine centres the pieces of the line under way on its height.
func (l *proseLay) endLine() {
	for i := l.first; i < len(l.pieces); i++ {
		l.pieces[i].at.Y = l.y + (l.tall-l.pieces[i].size.Height)/2
	}
}

func (l *proseLay) newLine() {
	l.endLine()
	l.first = len(l.pieces)
	l.x = 0
	l.y += l.tall + proseLeading
	l.tall = l.line
}

// extents keeps the sizes of words: to shape them anew for every answer costs more than all the rest. The window's goroutine alone uses it.
var extents = map[extentKey]fyne.Size{}

type extentKey struct {
	text string
	size float32
	bold bool
	font fyne.Resource
}

// textExtent is the size of a text in plain or bold.
func textExtent(text string, size float32, style fyne.TextStyle) fyne.Size {
	key := extentKey{text, size, style.Bold, fyne.CurrentApp().Settings().Theme().Font(style)}
	if s, ok := extents[key]; ok {
		return s
	}
	if len(extents) > 4000 {
		clear(extents)
	}
	s := fyne.MeasureText(text, size, style)
	extents[key] = s
	return s
}
