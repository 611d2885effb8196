package rules

import (
	"fmt"
	"math"
	"slices"
)

// Kinds of check.
const (
	CheckDevice           = "device"            // the load has none
	CheckLoadDevice       = "load-device"       // load ≤ device
	CheckLoadTerminal     = "load-terminal"     // load ≤ terminal
	CheckLoadPermitted    = "load-permitted"    // load ≤ permitted
	CheckDevicePermitted  = "device-permitted"  // device ≤ permitted
	CheckTripping         = "tripping"          // conventional tripping current ≤ 1.45 × permitted
	CheckContinuousDevice = "continuous-device" // 125 % of a continuous load ≤ device
	CheckContinuousWire   = "continuous-wire"   // 125 % of a continuous load ≤ the table's current before factors
	CheckMotorWire        = "motor-wire"        // 125 % of a motor ≤ permitted
	CheckSmallConductor   = "small-conductor"   // device ≤ cap of a small conductor
)

// Factors of the checks.
const (
	continuousFactor = 1.25 // NEC 210.19(A), 210.20(A), 215.2, 215.3
	motorFactor      = 1.25 // NEC 430.22
	trippingFactor   = 1.45 // IEC 60364-4-43, 433.1
	nextSizeUpToA    = 800  // NEC 240.4(B)
)

// Protect compares each load with its device and both with the permitted currents of each origin. American sizes are judged by the NEC, others by
// IEC 60364-4-43. A load without a device gets one check that says so, beside those that need none.
func (b *Book) Protect(r Run, permitted []Permitted) (out []Protected) {
	caps := b.Terminals(r)
	for _, l := range r.Loads {
		wires := r.wiresOf(l)
		if len(wires) == 0 {
			continue
		}
		p := protecting{book: b, load: l, wires: wires, american: american(wires)}
		if l.Device.RatingA > 0 {
			p.device()
		} else {
			p.add(Check{Kind: CheckDevice, Text: fmt.Sprintf("What protects %s is unknown: its permitted currents are not a device rating. Write protection with kind and rating_a.", l.ID)})
		}
		p.terminals(caps)
		for _, q := range permitted {
			p.permitted(q)
		}
		p.continuousWire()
		out = append(out, Protected{Load: l.ID, Unknown: !(l.Device.RatingA > 0), Checks: p.checks})
	}
	return out
}

// wiresOf are a load's conductors that carry its current.
func (r Run) wiresOf(l Load) (out []Conductor) {
	for _, c := range r.Conductors {
		if c.Load == l.ID && c.Role != Earth && c.Role != Spare {
			out = append(out, c)
		}
	}
	return out
}

func american(wires []Conductor) bool {
	n := 0
	for _, c := range wires {
		if n--; c.american() {
			n += 2
		}
	}
	return n > 0
}

// protecting collects the checks of one load.
type protecting struct {
	book     *Book
	load     Load
	wires    []Conductor
	american bool
	checks   []Check
}

func (p *protecting) add(c Check) { p.checks = append(p.checks, c) }

// compare adds a check of two known currents; a load that is unknown makes it unknown.
func (p *protecting) compare(c Check, value, limit string) {
	c.Known = !math.IsNaN(c.Value) && !math.IsNaN(c.Limit)
	c.Within = c.Known && c.Value <= c.Limit+1e-9
	where := ""
	if c.Clause != "" {
		where = " (" + c.Clause
		if c.FromMemory {
			where += ", from memory"
		}
		where += ")"
	}
	switch {
	case math.IsNaN(c.Value):
		c.Text = fmt.Sprintf("The current of %s is unknown, so it can't be compared with %s%s.", p.load.ID, limit, where)
	case math.IsNaN(c.Limit):
		c.Text = fmt.Sprintf("%s can't be compared: %s is unknown%s.", value, limit, where)
	case c.Within:
		c.Text = fmt.Sprintf("%s, %s, is within %s, %s; margin %s%s.", value, needed(c.Value), limit, amperes(c.Limit), amperes(c.Limit-c.Value), where)
	default:
		c.Text = fmt.Sprintf("%s, %s, exceeds %s, %s, by %s%s.", value, needed(c.Value), limit, amperes(c.Limit), needed(c.Value-c.Limit), where)
	}
	p.add(c)
}

// device checks what concerns load and device alone.
func (p *protecting) device() {
	l := p.load
	clause := "IEC 60364-4-43, 433.1"
	if p.american {
		clause = "NEC 210.20(A)"
	}
	name := p.deviceName()
	p.compare(Check{Kind: CheckLoadDevice, Value: l.CurrentA, Limit: l.Device.RatingA, Clause: clause}, "The load of "+l.ID, "its "+name)
	if !p.american {
		return
	}
	if l.Continuous && !l.Motor {
		p.compare(Check{Kind: CheckContinuousDevice, Value: continuousFactor * l.CurrentA, Limit: l.Device.RatingA, Clause: "NEC 210.20(A), 215.3"},
			"125 % of the continuous load of "+l.ID, "its "+name)
		if last := &p.checks[len(p.checks)-1]; last.Known && !last.Within {
			last.Text += " A device listed for continuous operation at 100 % of its rating is excepted."
		}
	}
	p.smallConductor()
}

func (p *protecting) deviceName() string { return wordOr(p.load.Device.Kind, "device") }

// smallConductor is NEC 240.4(D): the device of a small conductor is capped, whatever the wire may carry.
func (p *protecting) smallConductor() {
	d := p.book.devices
	limit := Check{Kind: CheckSmallConductor, Value: p.load.Device.RatingA, Limit: math.Inf(1), Clause: "NEC 240.4(D)", FromMemory: d.memory}
	size := ""
	for _, c := range p.wires {
		i := slices.IndexFunc(d.small, func(s smallConductor) bool { return s.metal == metalOf(c.Metal) && s.size == c.Size })
		if i >= 0 && d.small[i].ampere < limit.Limit {
			limit.Limit, limit.Conductor, size = d.small[i].ampere, c.ID, c.Size.Pretty()
		}
	}
	switch {
	case size == "":
		return
	case p.load.Motor:
		limit.Text = fmt.Sprintf("The cap of %s on the device of %s wire does not hold for %s, a motor circuit (NEC 240.4(G), 430.52).", amperes(limit.Limit), size, p.load.ID)
		p.add(limit)
		return
	}
	p.compare(limit, "The "+p.deviceName()+" of "+p.load.ID, "what "+size+" wire may have")
	last := &p.checks[len(p.checks)-1]
	if !last.Within {
		last.Text += " Taps (240.4(E)) and circuits named in 240.4(G) are excepted."
	}
}

// terminals checks the load against the weakest terminal.
func (p *protecting) terminals(caps []Cap) {
	weakest := Cap{A: math.Inf(1)}
	for _, c := range caps {
		if c.Load == p.load.ID && c.A < weakest.A {
			weakest = c
		}
	}
	if !math.IsInf(weakest.A, 1) {
		p.compare(Check{Kind: CheckLoadTerminal, Conductor: weakest.Conductor, Value: p.load.CurrentA, Limit: weakest.A, Clause: weakest.Clause, FromMemory: weakest.Memory},
			"The load of "+p.load.ID, "what its terminal permits")
	}
}

// permitted checks load and device against the lowest permitted current of the load's conductors from one origin.
func (p *protecting) permitted(q Permitted) {
	id, a := p.lowest(q)
	if id == "" {
		return
	}
	whose := "what " + q.By + " permits in " + id
	if u := p.book.find(q.By); u != nil {
		whose = "what " + u.name + " permits in " + id
	} else if q.By == "computed" {
		whose = "the computed current of " + id
	}
	l := p.load
	p.compare(Check{Kind: CheckLoadPermitted, By: q.By, Conductor: id, Value: l.CurrentA, Limit: a}, "The load of "+l.ID, whose)
	if p.american && l.Motor {
		p.compare(Check{Kind: CheckMotorWire, By: q.By, Conductor: id, Value: motorFactor * l.CurrentA, Limit: a, Clause: "NEC 430.22"}, "125 % of the motor "+l.ID, whose)
	}
	if !(l.Device.RatingA > 0) {
		return
	}
	p.devicePermitted(q.By, id, a, whose)
	if !p.american {
		p.tripping(q.By, id, a, whose)
	}
}

// lowest is the load's conductor with the lowest permitted current; NaN where one is unknown.
func (p *protecting) lowest(q Permitted) (id string, a float64) {
	for _, c := range p.wires {
		v, ok := q.A[c.ID]
		switch {
		case !ok:
		case math.IsNaN(v):
			return c.ID, v
		case id == "" || v < a:
			id, a = c.ID, v
		}
	}
	return id, a
}

// devicePermitted is device ≤ permitted; the NEC lets the next standard rating up to 800 A stand (240.4(B)).
func (p *protecting) devicePermitted(by, id string, a float64, whose string) {
	l := p.load
	c := Check{Kind: CheckDevicePermitted, By: by, Conductor: id, Value: l.Device.RatingA, Limit: a, Clause: "IEC 60364-4-43, 433.1"}
	if p.american {
		c.Clause = "NEC 240.4"
	}
	p.compare(c, "The "+p.deviceName()+" of "+l.ID, whose)
	last := &p.checks[len(p.checks)-1]
	next := p.book.devices.next(a)
	switch {
	case last.Within || !last.Known || !p.american:
	case l.Motor:
		last.Text += " The short-circuit device of a motor may be larger (NEC 430.52); its overload relay then protects the wire."
	case next > 0 && l.Device.RatingA <= next && l.Device.RatingA <= nextSizeUpToA:
		last.NextSizeUp = true
		last.Text += " It is the next standard rating above what is permitted, which the code lets stand up to 800 A unless the circuit feeds several receptacles (NEC 240.4(B), 240.6(A), from memory)."
	}
}

// tripping is I2 ≤ 1.45 × permitted.
func (p *protecting) tripping(by, id string, a float64, whose string) {
	l := p.load
	c := Check{Kind: CheckTripping, By: by, Conductor: id, Value: math.NaN(), Limit: trippingFactor * a, Clause: "IEC 60364-4-43, 433.1"}
	if !(l.Device.TripsAt > 0) {
		c.Text = fmt.Sprintf("The current at which the %s of %s trips is unknown: write trips_at, for example 1.45 (%s).", p.deviceName(), l.ID, c.Clause)
		p.add(c)
		return
	}
	c.Value = l.Device.TripsAt * l.Device.RatingA
	p.compare(c, "The tripping current of the "+p.deviceName()+" of "+l.ID, "1.45 times "+whose)
}

// continuousWire is NEC 210.19(A)(1): before any factor the wire carries 125 % of a continuous load, in the column of its terminals.
func (p *protecting) continuousWire() {
	l := p.load
	if !p.american || !l.Continuous || l.Motor {
		return
	}
	least := Cap{A: math.Inf(1)}
	for _, c := range p.wires {
		if cp := p.book.terminal(c, Load{ID: l.ID, CurrentA: l.CurrentA, Device: l.Device, Terminal: Terminal{RatingC: l.Terminal.RatingC}}); cp.A < least.A {
			least = cp
		}
	}
	if math.IsInf(least.A, 1) {
		return
	}
	p.compare(Check{Kind: CheckContinuousWire, Conductor: least.Conductor, Value: continuousFactor * l.CurrentA, Limit: least.A, Clause: "NEC 210.19(A)(1), 215.2(A)(1)", FromMemory: true},
		"125 % of the continuous load of "+l.ID, "the table's current of "+least.Conductor+" in the column of its terminals, before factors")
}
