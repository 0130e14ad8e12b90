package modes

import (
	"math"
	"slices"

	"glassthread/modes/bessel"
)

// GuidedLP returns every guided LP mode at a normalised frequency v above 0 and at
// most MaxListV, in falling B. None is missed: the number of modes of each order l is
// the number of zeros of J_{l-1} (for l = 0 of J_1, and LP01) below v. Each label stands
// once; see Degeneracy. The errors are those of SolveLP. The cost is linear in the
// number of modes, but for sorting them. AppendGuidedLP saves making the list anew.
func GuidedLP(v float64) ([]LP, error) {
	if err := checkV("modes.GuidedLP", v, MaxListV); err != nil {
		return nil, err
	}
	return AppendGuidedLP(make([]LP, 0, int(v*v/8+v)+2), v)
}

// AppendGuidedLP appends the modes that GuidedLP returns to a list. It allocates only to
// let the list grow, so a list that is used again costs nothing.
func AppendGuidedLP(list []LP, v float64) ([]LP, error) {
	if err := checkV("modes.AppendGuidedLP", v, MaxListV); err != nil {
		return list, err
	}
	start := len(list)
	var last history
	for l := 0; ; l++ {
		n := countModes(v, l)
		if n == 0 {
			break
		}
		list = last.appendOrder(list, v, l, n)
	}
	sortModes(list[start:])
	return list, nil
}

// sortModes sorts by falling B. The modes of a fibre are spread nearly evenly over B
// (Gloge and Marcatili, Bell Syst. Tech. J. 52, 1563, 1973), so a long list is first dealt
// into boxes of B in place.
func sortModes(list []LP) {
	const boxes = 4096
	if len(list) < 2*boxes {
		slices.SortFunc(list, fallingB)
		return
	}
	box := func(p *LP) int { return min(boxes-1, int((1-p.B)*boxes)) }
	var start, end [boxes]int
	for i := range list {
		end[box(&list[i])]++
	}
	sum := 0
	for i := range end {
		start[i] = sum
		sum += end[i]
		end[i] = sum
	}
	next := start
	for i := range boxes {
		for next[i] < end[i] {
			at := next[i]
			home := box(&list[at])
			if home != i {
				list[at], list[next[home]] = list[next[home]], list[at]
			}
			next[home]++
		}
	}
	for i := range boxes {
		slices.SortFunc(list[start[i]:end[i]], fallingB)
	}
}

// fallingB orders modes by falling B, then by label.
func fallingB(a, b LP) int {
	switch {
	case a.B > b.B:
		return -1
	case a.B < b.B:
		return 1
	case a.L != b.L:
		return a.L - b.L
	}
	return a.M - b.M
}

// appendOrder appends the n modes of order l, and notes them.
func (h *history) appendOrder(list []LP, v float64, l, n int) []LP {
	first := len(list)
	list, ok := h.appendFrom(list, v, l, n, true)
	if !ok { // good predictions have never come to this
		list, _ = h.appendFrom(list[:first], v, l, n, false)
	}
	h.next()
	return list
}

// appendFrom solves from predicted trials, where there are and it is asked to, and reports
// whether the labels are certain. They are for roots found in their bracket or by solveLarge,
// and the last is one of these; a root that a free trial led to a neighbour's is then met
// twice, while true neighbours differ by more than 1, as j_{l-1,m+1} and j_{l,m} do.
func (h *history) appendFrom(list []LP, v float64, l, n int, predict bool) ([]LP, bool) {
	before := -1.0
	for m := 1; m <= n; m++ {
		p, ok := LP{L: l, M: m, V: v}, false
		if u, known := h.guess(m); known && predict && m < n {
			ok = p.solveLarge(u) || p.solveFreely(u)
		}
		if !ok {
			p = solveGuided(v, l, m)
		}
		if predict && !(p.U > before+1) {
			return list, false
		}
		before = p.U
		h.note(m, p.U)
		list = append(list, p)
	}
	return list, true
}

// solveGuided solves a mode that is known to be guided.
func solveGuided(v float64, l, m int) LP {
	high, low, _ := cutoffParts(l, m) // in range, since v is
	end, _ := bessel.JZero(l, m)
	return solveLP(v, l, m, high, (v-high)-low, end)
}

// countModes returns how many modes of order l are guided at v.
func countModes(v float64, l int) int {
	switch l {
	case 0:
		return 1 + countZeros(1, v)
	}
	return countZeros(l-1, v)
}

// countZeros returns how many zeros of J_l lie below v: J_l = M cos(theta) has its m-th
// zero where theta = (m - 1/2) pi. Where the expansion of theta does not reach, or v is
// as good as a zero, the zeros themselves decide.
func countZeros(l int, v float64) int {
	m := 0
	if theta, _, _, ok := bessel.JPhase(l, v, 0); ok {
		turns := theta/math.Pi + 0.5
		m = int(turns)
		if part := turns - float64(m); part > 1e-6 && part < 1-1e-6 {
			return m
		}
		m = max(0, m-1)
	}
	for {
		high, low, err := bessel.JZeroParts(l, m+1)
		if err != nil || (v-high)-low <= 0 {
			return m
		}
		m++
	}
}

// solveFreely solves from a good trial u, without a bracket, and reports whether that
// converged near it.
func (p *LP) solveFreely(start float64) bool {
	u := start
	for range 4 {
		if !(u > float64(p.L) && u < p.V) {
			return false
		}
		_, step := p.phaseStep(u)
		if math.Abs(step) < lastStep4*math.Min(1, p.V-u) {
			p.setU(u, step)
			return math.Abs(u-start) < 0.3
		}
		u -= step
	}
	return false
}

// history holds u of the modes of the last four orders, to predict the next order's: u is
// a smooth function of l.
type history struct {
	u      [4][maxRadial]float64 // of the order l at l mod 4
	n      [4]int                // how many are known
	orders int
}

// maxRadial exceeds the number of modes of any order at MaxListV, MaxListV/pi.
const maxRadial = 1024

func (h *history) note(m int, u float64) {
	row := h.orders % 4
	h.u[row][m-1] = u
	h.n[row] = m
}

func (h *history) next() { h.orders++ }

// guess extrapolates with a cubic through the last four orders.
func (h *history) guess(m int) (u float64, known bool) {
	if h.orders < 5 || min(h.n[(h.orders+1)%4], h.n[(h.orders+2)%4], h.n[(h.orders+3)%4]) < m {
		return 0, false
	}
	at := func(back int) float64 { return h.u[(h.orders-back)&3][m-1] }
	return 4*(at(1)+at(3)) - 6*at(2) - at(4), true
}
