package snell

import (
	"math"

	"glassthread/materials/domain"
)

// Indices outside this range have no physical sense; inside it no product of
// indices that occurs here leaves the range of a float64.
const (
	leastIndex    = 1e-40
	greatestIndex = 1e40
)

// ray is a plane wave in a lossless medium of index n at an angle to the normal
// of the interfaces. Its wave-vector components are in units of 2 pi/wavelength:
// kx along the interfaces, common to all media, and kz across them.
type ray struct {
	n, angle float64
	sin, cos float64
	kx, kz   float64
}

func newRay(n, angle float64) ray {
	r := ray{n: n, angle: angle}
	if angle <= math.Pi/4 {
		r.sin, r.cos = math.Sincos(angle)
	} else {
		// From the complement, so that the cosine keeps its digits near grazing.
		r.cos, r.sin = math.Sincos((quarterTurn.hi - angle) + quarterTurn.lo)
	}
	r.kx, r.kz = n*r.sin, n*r.cos
	return r
}

// nearly is the share of its terms down to which a difference is taken in plain
// arithmetic; below it twofold arithmetic takes over.
const nearly = 0.25

// normalSquared returns kz^2 = a^2 - kx^2 in a lossless medium of index a. It is
// below zero where the wave decays there. Its relative error is a few units in
// the last place however near the critical angle is.
func (r *ray) normalSquared(a float64) float64 {
	if r.angle <= math.Pi/4 {
		d := a - r.kx
		if math.Abs(d) >= nearly*r.kx {
			return d * (a + r.kx)
		}
		s := sineSquared(twofold{r.angle, 0})
		n2 := twoProduct(r.n, r.n)
		return twoProduct(a, a).minus(n2.times(s)).hi
	}
	difference, kz2 := (a-r.n)*(a+r.n), r.kz*r.kz
	sum := difference + kz2
	if difference >= 0 || math.Abs(sum) >= nearly*kz2 {
		return sum
	}
	c := r.cosineSquared()
	n2 := twoProduct(r.n, r.n)
	return twoProduct(a, a).minus(n2).plus(n2.times(c)).hi
}

// cosineSquared is for angles of pi/4 and above.
func (r *ray) cosineSquared() twofold {
	complement := twoSum(quarterTurn.hi-r.angle, quarterTurn.lo)
	complement.lo += thirdPart
	return sineSquared(complement)
}

// normal returns kz in a medium of index n, on the branch that decays or runs
// away from the interface: neither part is negative.
func (r *ray) normal(n complex128) complex128 {
	a, b := real(n), imag(n)
	q := r.normalSquared(a)
	if b == 0 {
		if q < 0 {
			return complex(0, math.Sqrt(-q))
		}
		return complex(math.Sqrt(q), 0)
	}
	q -= b * b
	p := 2 * a * b
	h := math.Hypot(q, p)
	if q >= 0 {
		x := math.Sqrt((h + q) / 2)
		return complex(x, p/(2*x))
	}
	y := math.Sqrt((h - q) / 2)
	return complex(p/(2*y), y)
}

// contrast returns n^2 - r.n^2.
func (r *ray) contrast(n complex128) complex128 {
	a, b := real(n), imag(n)
	return complex((a-r.n)*(a+r.n)-b*b, 2*a*b)
}

// brewster returns n^2 cos^2 - r.n^2 sin^2, the factor of the reflection of p
// waves that vanishes at the Brewster angle.
func (r *ray) brewster(n complex128) complex128 {
	a, b := real(n), imag(n)
	d := a*r.cos - r.kx
	real := d * (a*r.cos + r.kx)
	if math.Abs(d) < nearly*r.kx {
		real = r.brewsterTwofold(a)
	}
	if b == 0 {
		return complex(real, 0)
	}
	c2 := r.cos * r.cos
	return complex(real-b*b*c2, 2*a*b*c2)
}

func (r *ray) brewsterTwofold(a float64) float64 {
	a2, n2 := twoProduct(a, a), twoProduct(r.n, r.n)
	if r.angle <= math.Pi/4 {
		return a2.minus(a2.plus(n2).times(sineSquared(twofold{r.angle, 0}))).hi
	}
	return a2.plus(n2).times(r.cosineSquared()).minus(n2).hi
}

func checkIndex(function, argument string, n float64) error {
	return domain.Within(function, argument, n, leastIndex, greatestIndex, "")
}

// checkComplexIndex refuses gain (a negative imaginary part) and no index at all.
func checkComplexIndex(function, argument string, n complex128) error {
	a, b := real(n), imag(n)
	if a >= 0 && a <= greatestIndex && b >= 0 && b <= greatestIndex && (a >= leastIndex || b >= leastIndex) {
		return nil
	}
	return refusedIndex(function, argument, a, b)
}

func refusedIndex(function, argument string, a, b float64) error {
	if !(a >= 0 && a <= greatestIndex) {
		return domain.Within(function, "real part of "+argument, a, 0, greatestIndex, "")
	}
	if !(b >= 0 && b <= greatestIndex) {
		return domain.Within(function, "imaginary part of "+argument, b, 0, greatestIndex, "")
	}
	return domain.Within(function, argument, math.Max(a, b), leastIndex, greatestIndex, "")
}

func checkIncidence(function string, incidence float64) error {
	if incidence >= 0 && incidence <= math.Pi/2 {
		return nil
	}
	return &domain.Error{Func: function, Argument: "incidence", Value: incidence, Allowed: "from 0 to pi/2 (rad)"}
}

func checkInterface(function string, n1, n2, incidence float64) error {
	if err := checkIndex(function, "n1", n1); err != nil {
		return err
	}
	if err := checkIndex(function, "n2", n2); err != nil {
		return err
	}
	return checkIncidence(function, incidence)
}
