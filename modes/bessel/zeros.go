package bessel

import (
	"math"

	"glassthread/materials/domain"
)

// JZero returns j_{l,m}, the m-th positive zero of J_l, for l from 0 and m from 1
// to MaxOrder, to half a unit in the last place or little more.
func JZero(l, m int) (float64, error) {
	high, _, err := JZeroParts(l, m)
	return high, err
}

// JZeroParts returns j_{l,m} as the unevaluated sum of a float64 and a small rest,
// so that the distance of a nearby x from the zero, (x - high) - low, keeps its
// digits. The sum has an absolute error of the order of 1e-16.
func JZeroParts(l, m int) (high, low float64, err error) {
	if err := checkOrder("bessel.JZero", l); err != nil {
		return 0, 0, err
	}
	if m < 1 || m > MaxOrder {
		return 0, 0, &domain.Error{Func: "bessel.JZero", Argument: "m", Value: float64(m), Allowed: "from 1 to 100000"}
	}
	high, low = jZero(l, m)
	return high, low, nil
}

// JPrimeZero returns j'_{l,m}, the m-th zero of dJ_l/dx, for l from 0 and m from 1 to
// MaxOrder, to about one unit in the last place. As in DLMF 10.21(i), j'_{0,1} is 0 and
// otherwise j'_{0,m} is j_{1,m-1}; for l >= 1 the zero at 0 is not counted.
func JPrimeZero(l, m int) (float64, error) {
	if err := checkOrder("bessel.JPrimeZero", l); err != nil {
		return 0, err
	}
	if m < 1 || m > MaxOrder {
		return 0, &domain.Error{Func: "bessel.JPrimeZero", Argument: "m", Value: float64(m), Allowed: "from 1 to 100000"}
	}
	if l == 0 {
		if m == 1 {
			return 0, nil
		}
		high, _ := jZero(1, m-1)
		return high, nil
	}
	x := jPrimeZeroGuess(l, m)
	nu := float64(l)
	for range 10 {
		var step float64
		if theta, s, rho, ok := JPhase(l, x, m-1); ok && l >= directOrders {
			// J' = 0 where tan(theta) = rho/s. With t = ln x, ds/dt = -2 rho s, and
			// rho's derivative is from the Riccati equation.
			tangent := rho / s
			turn := (s*s - (x-nu)*(x+nu) + rho*rho) / s
			step = (theta - math.Atan(tangent)) * x / (s - turn/(1+tangent*tangent))
		} else {
			below, j := jPair(l, x)
			r := 1 / x
			first := below - nu*r*j
			well := (1 - nu*r) * (1 + nu*r)
			second := -first*r - well*j
			third := -second*r + first*(r*r-well) - 2*nu*nu*r*r*r*j
			h := first / second
			step = h / (1 - h*third/(2*second)) // Halley
		}
		x -= step
		if math.Abs(step) < 1e-8*x {
			break
		}
	}
	return x, nil
}

func jZero(l, m int) (high, low float64) {
	if l < tableOrders && m <= tableStart[l+1]-tableStart[l] {
		z := zeroTable[tableStart[l]+m-1]
		return z.high, z.low
	}
	x := jZeroGuess(l, m)
	nu := float64(l)
	for range 8 {
		var step float64
		if theta, s, _, ok := JPhase(l, x, m-1); ok && l >= directOrders {
			// J_l vanishes at theta = pi/2, and theta is nearly linear in x.
			step = (theta - math.Pi/2 - piLow/2) * x / s
		} else {
			below, at := jPair(l, x)
			// Halley's step, from J' = J_{l-1} - l J/x and Bessel's equation: the error
			// after it is of the order of the step cubed.
			h := at / (below - nu/x*at)
			step = h / (1 + h*(1/x+(1-nu/x)*(1+nu/x)*h)/2)
		}
		high = x - step
		low = (x - high) - step
		x = high
		if math.Abs(step) < 1e-8*(1+nu/256) {
			break
		}
	}
	return high, low
}

// jZeroGuess returns j_{l,m} to an error that is a small part of the distance to
// its neighbours: McMahon's series for order 0 (DLMF 10.21.19), Olver's uniform
// one for the others (DLMF 10.21.41 with its first two terms).
func jZeroGuess(l, m int) float64 {
	if l == 0 {
		b := (float64(m) - 0.25) * math.Pi
		r := 1 / (8 * b)
		return b + r*(1-r*r*(124./3-r*r*120928./15))
	}
	// The m-th zero of Ai is -t, from DLMF 9.9.6 and 9.9.18.
	t := 3 * math.Pi / 8 * float64(4*m-1)
	t2 := 1 / (t * t)
	t = math.Cbrt(t*t) * (1 + t2*(5./48-t2*(5./36-t2*77125./82944)))
	nu := float64(l)
	zeta, tau, z := olver(nu, t)
	b0 := 0.018 // 2^(1/3)/70, the limit of what follows for zeta to 0
	if zeta > 0.2 {
		b0 = -5/(48*zeta*zeta) + (5/(24*tau*tau*tau)+1/(8*tau))/math.Sqrt(zeta)
	}
	h2 := 2 * math.Sqrt(zeta) / tau
	return nu*z + z*h2*b0/(2*nu)
}

// jPrimeZeroGuess is the leading term of DLMF 10.21.43, for l >= 1.
func jPrimeZeroGuess(l, m int) float64 {
	// The m-th zero of Ai' is -t, from DLMF 9.9.8 and 9.9.19; the series is poor for the
	// first, 1.01879 (DLMF table 9.9.1).
	t := 1.01879
	if m > 1 {
		t = 3 * math.Pi / 8 * float64(4*m-3)
		t2 := 1 / (t * t)
		t = math.Cbrt(t*t) * (1 - t2*(7./48-t2*35./288))
	}
	_, _, z := olver(float64(l), t)
	return float64(l) * z
}

// olver returns -zeta = t nu^(-2/3), z(zeta) and the root of z^2 - 1 (DLMF 10.20.3).
func olver(nu, t float64) (zeta, tau, z float64) {
	zeta = t / math.Cbrt(nu*nu)
	tau = tanLessAngle(2. / 3 * zeta * math.Sqrt(zeta))
	return zeta, tau, math.Sqrt(1 + tau*tau)
}

// tanLessAngle solves tau - atan(tau) = y for y > 0.
func tanLessAngle(y float64) float64 {
	tau := math.Cbrt(3*y) * (1 + math.Cbrt(9*y*y)/5)
	if y > 1 {
		tau = y + math.Pi/2 - 1/(y+math.Pi/2)
	}
	for range 4 {
		tau -= (tau - math.Atan(tau) - y) * (1 + 1/(tau*tau))
	}
	return tau
}
