package radial_test

import (
	"flag"
	"fmt"
	"math"
	"math/rand"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/modes/bessel"
	"glassthread/modes/radial"
)

var profiles = flag.Int("profiles", 2000, "random profiles in the proof that lists are complete")

// zeros counts the zeros from the axis to infinity of the field that is regular on the axis,
// at order l and lambda > 0: the number of modes above lambda (Sturm's oscillation theorem). It
// integrates psi” = (l^2 - R^2 (V^2 f - lambda)) psi in ln R by Runge-Kutta steps of a
// fraction of a wave, and knows nothing of the library. Beyond R = 1 the field has one more zero
// if it falls faster than K_l there. It also returns how far from that the field is.
func zeros(p radial.Profile, v float64, l int, lambda, fine float64) (n int, margin float64) {
	order := float64(l)
	q := func(piece int, r float64) float64 {
		return order*order - r*r*(v*v*p.Pieces[piece].F(r)-lambda)
	}
	start := math.Min(1e-4/math.Max(v, 1), p.Pieces[0].To/2)
	y, d := 1.0, order
	for i, piece := range p.Pieces {
		at, end := math.Log(math.Max(piece.From, start)), math.Log(piece.To)
		for at < end {
			r := math.Exp(at)
			h := math.Min(0.05, end-at)
			// q at the end of the step may be larger.
			wave := math.Sqrt(math.Max(math.Abs(q(i, r)), math.Abs(q(i, math.Min(r*math.Exp(h), piece.To)))))
			h = math.Min(h, fine/(1+wave))
			r2, r3 := math.Min(r*math.Exp(h/2), piece.To), math.Min(r*math.Exp(h), piece.To)
			q1, q2, q3 := q(i, r), q(i, r2), q(i, r3)
			a1, b1 := d, q1*y
			a2, b2 := d+h/2*b1, q2*(y+h/2*a1)
			a3, b3 := d+h/2*b2, q2*(y+h/2*a2)
			a4, b4 := d+h*b3, q3*(y+h*a3)
			next := y + h/6*(a1+2*a2+2*a3+a4)
			d += h / 6 * (b1 + 2*b2 + 2*b3 + b4)
			if next > 0 != (y > 0) {
				n++
			}
			y = next
			size := math.Abs(y) + math.Abs(d)
			y, d = y/size, d/size
			at += h
			if h < 1e-15 {
				break
			}
		}
	}
	g, _ := bessel.Decay(l, math.Sqrt(lambda))
	above := d + (order+g)*y
	if above > 0 != (y > 0) {
		n++
	}
	return n, math.Abs(above) / (1 + order)
}

// random draws a profile: layers of any sign, rings, dips, W and trench profiles, powers,
// graded layers.
func random(r *rand.Rand) (radial.Profile, string) {
	switch r.Intn(4) {
	case 0:
		alpha := math.Exp(math.Log(0.5) + r.Float64()*math.Log(200))
		return power(alpha), fmt.Sprintf("1 - R^%v", alpha)
	case 1: // a power with a dip on the axis and a trench around
		alpha, core, dip := 1+9*r.Float64(), 0.3+0.5*r.Float64(), r.Float64()
		trench, depth, width := core+(1-core)*r.Float64(), r.Float64(), 0.05+0.3*r.Float64()
		graded := func(x float64) float64 {
			return -math.Expm1(alpha*math.Log(x/core)) - dip*math.Exp(-x*x/(width*width))
		}
		inner := radial.Piece{To: core, Graded: true, F: func(x float64) float64 {
			if x == 0 {
				return 1 - dip
			}
			return graded(x)
		}}
		flat := func(f float64) func(float64) float64 { return func(float64) float64 { return f } }
		return radial.Profile{Pieces: []radial.Piece{inner, {From: core, To: trench, F: flat(0)}, {From: trench, To: 1, F: flat(-depth)}}},
			fmt.Sprintf("1 - (R/%v)^%v less dip %v of width %v, trench %v from %v", core, alpha, dip, width, depth, trench)
	default:
		n := 1 + r.Intn(5)
		var ends, f []float64
		sum := 0.0
		for range n {
			sum += 0.02 + r.Float64()
			ends = append(ends, sum)
			f = append(f, 1.8*r.Float64()-0.8)
		}
		for i := range ends {
			ends[i] /= sum
		}
		ends[n-1] = 1
		f[r.Intn(n)] = 1
		return layers(ends, f), fmt.Sprintf("layers to %v of %v", ends, f)
	}
}

// The list has as many modes of each order as the field has zeros, counted by another method;
// each label is the number of its field's nodes; nothing twice; falling B.
func TestListIsComplete(t *testing.T) {
	const seed = 20261201
	t.Logf("seed %d, %d profiles (flag -profiles)", seed, *profiles)
	r := rand.New(rand.NewSource(seed))
	orders, modes, close := 0, 0, 0
	for k := range *profiles {
		p, name := random(r)
		v := math.Exp(r.Float64() * math.Log(14))
		list := guided(t, p, v)
		byOrder := map[int][]float64{}
		for i, e := range list {
			require.True(t, e.B > 0 && e.B < 1, "%v", e)
			if i > 0 {
				require.GreaterOrEqual(t, list[i-1].B, e.B)
			}
			byOrder[e.L] = append(byOrder[e.L], e.B)
			require.Equal(t, len(byOrder[e.L]), e.M, "%v at V = %v", name, v)
		}
		last := len(byOrder) // the first order without a mode
		for l := 0; l <= last; l++ {
			bs := byOrder[l]
			if l < last {
				require.NotEmpty(t, bs)
			}
			// Above the least b that is listed, between any two, and above all.
			for i := 0; i <= len(bs); i++ {
				low, high := 1e-12, 1.0
				if i < len(bs) {
					low = bs[i]
				}
				if i > 0 {
					high = bs[i-1]
				}
				b := low
				switch {
				case i < len(bs) && high-low < 1e-4:
					continue // modes apart by tunnelling only
				case i < len(bs):
					b = (low + high) / 2
				case i > 0 && bs[i-1] < 1e-6:
					continue
				}
				n, margin := zeros(p, v, l, b*v*v, 0.1)
				if n != i && margin < 1e-4 {
					n, margin = zeros(p, v, l, b*v*v, 0.01)
				}
				if n != i && i == len(bs) && margin < 1e-6 {
					close++ // a mode at cut-off
					continue
				}
				require.Equal(t, i, n, "profile %d, %v, at V = %v: modes of order %d above b = %v; list %v", k, name, v, l, b, bs)
				orders++
			}
			for m := 1; m <= len(bs) && k%4 == 0; m++ {
				s, err := radial.SolveField(p, v, l, m)
				require.NoError(t, err)
				require.InDelta(t, bs[m-1], s.B, 1e-12)
				require.Equal(t, m-1, nodes(s), "%v at V = %v, LP(%d,%d)", name, v, l, m)
				modes++
			}
		}
	}
	t.Logf("%d counts agree, %d fields; %d orders at a cut-off", orders, modes, close)
	assert.LessOrEqual(t, close, *profiles/200)
}

// nodes counts changes of sign of a field, but not those of its rounding errors.
func nodes(s radial.Solution) int {
	largest := 0.0
	for _, n := range s.Nodes {
		largest = math.Max(largest, math.Abs(n.Psi))
	}
	count, sign := 0, 0.0
	for _, n := range s.Nodes {
		if math.Abs(n.Psi) < 1e-9*largest {
			continue
		}
		if sign != 0 && n.Psi > 0 != (sign > 0) {
			count++
		}
		sign = n.Psi
	}
	return count
}

// A piece cut in two anywhere is the same fibre. The stiffness of an element of width h is
// some 100/h, whose rounding moves b by up to about 2e-12/(h V^2).
func TestCutPiecesChangeNothing(t *testing.T) {
	const seed = 7
	r := rand.New(rand.NewSource(seed))
	worst, share, n := 0.0, 0.0, 0
	for range 400 {
		p, name := random(r)
		v := math.Exp(r.Float64() * math.Log(30))
		var cut radial.Profile
		thinnest := 1.0
		for _, q := range p.Pieces {
			middle := q.From + (q.To-q.From)*(0.1+0.8*r.Float64())
			cut.Pieces = append(cut.Pieces, radial.Piece{From: q.From, To: middle, F: q.F, Graded: q.Graded},
				radial.Piece{From: middle, To: q.To, F: q.F})
			thinnest = math.Min(thinnest, math.Min(middle-q.From, q.To-middle))
		}
		whole, parts := guided(t, p, v), guided(t, cut, v)
		for _, a := range whole {
			b, ok := entry(parts, a.L, a.M)
			if !ok {
				require.Less(t, a.B, 1e-11, "%v at V = %v", name, v)
				continue
			}
			change := math.Abs(a.B - b.B)
			limit := 2e-12 + 2e-12/(thinnest*v*v)
			require.Less(t, change, limit, "seed %d: %v at V = %v, LP(%d,%d)", seed, name, v, a.L, a.M)
			if thinnest*v*v > 0.2 {
				worst = math.Max(worst, change)
			}
			share = math.Max(share, change/limit)
			n++
		}
	}
	t.Logf("%d modes: largest change of b %.1e without thin pieces, %.2g of the limit with", n, worst, share)
}

// A mode is guided just above its cut-off and not just below.
func TestCutoffVAgainstSolve(t *testing.T) {
	for _, p := range []radial.Profile{power(2), power(0.5), power(100), layers([]float64{0.3, 0.7, 1}, []float64{-0.5, 1, -0.4})} {
		for _, lm := range [][2]int{{1, 1}, {2, 1}, {5, 1}, {1, 2}, {3, 4}} {
			v, err := radial.CutoffV(p, lm[0], lm[1])
			require.NoError(t, err)
			_, err = radial.Solve(p, v*(1-1e-9), lm[0], lm[1])
			assert.ErrorIs(t, err, radial.ErrCutoff)
			e, err := radial.Solve(p, v*(1+1e-6), lm[0], lm[1])
			require.NoError(t, err)
			assert.Less(t, e.B, 1e-4)
		}
	}
}
