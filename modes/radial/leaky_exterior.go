package radial

import (
	"math"
	"math/cmplx"
)

// outgoing returns kappa = -w K_l'(w)/K_l(w) and its derivative with respect to lambda = w^2 on
// the branch w = -i u, u = sqrt(-lambda) with Re u > 0, where K_l(w R) is a multiple of H_l^(1)(u
// R), a wave that leaves the fibre when the time factor is exp(-i omega t) (DLMF 10.27.8).
// lambda must not be 0.
//
// From kappa_0, kappa_l = l + g_l with g_1 = lambda/kappa_0 and g_{j+1} = lambda/(2j + g_j), which
// for orders above |u| is the stable direction. There g's imaginary part, which makes the
// loss, falls as u^2l below the real one, and keeps its own relative accuracy, because no
// step adds a part of one to the other.
func outgoing(l int, lambda complex128) (kappa, slope complex128) {
	g := outgoing0(lambda)
	if l > 0 {
		g = lambda / g
		for j := 1; j < l; j++ {
			g = lambda / (complex(2*float64(j), 0) + g)
		}
	}
	order := complex(float64(l), 0)
	return order + g, (g*(g+2*order)/lambda - 1) / 2
}

// outgoing0 returns kappa of order 0, w K_1(w)/K_0(w): by the power series (DLMF 10.31) up to
// |u|^2 = 8, and beyond by the continued fraction for K_1/K_0 (N. M. Temme, J. Comput. Phys.
// 19, 324, 1975), which holds for |arg w| < pi. An argument next to the negative w axis, a
// wave that only grows outwards, for which it does not converge, gives NaN.
func outgoing0(lambda complex128) complex128 {
	if cmplx.Abs(lambda) <= 8 {
		const euler = 0.57721566490153286061
		t := lambda / 4
		half := cmplx.Log(-t)/2 - complex(0, math.Pi/2) // ln(w/2)
		// K_0 = -(ln(w/2) + gamma) I_0 + sum h_k t^k/k!^2, and
		// w K_1 = 1 + 2 t sum (ln(w/2) + gamma - (h_k + h_{k+1})/2) t^k/(k! (k+1)!).
		base := half + euler
		k0, k1 := complex(0, 0), complex(0, 0)
		term, h := complex(1, 0), 0.0
		for k := 0.0; k < 40; k++ {
			next := h + 1/(k+1)
			k0 += term * (complex(h, 0) - base)
			k1 += term / complex(k+1, 0) * (base - complex((h+next)/2, 0))
			h = next
			term *= t / complex((k+1)*(k+1), 0)
		}
		return (1 + 2*t*k1) / k0
	}
	u := cmplx.Sqrt(-lambda)
	w := complex(imag(u), -real(u))
	b := 2 * (1 + w)
	d := 1 / b
	h, change := d, d
	a := -0.25
	for i := 2; i < 5000; i++ {
		a -= 2 * float64(i-1)
		b += 2
		d = 1 / (b + complex(a, 0)*d)
		change *= b*d - 1
		h += change
		if cmplx.Abs(change) < 1e-17*cmplx.Abs(h) {
			return w + 0.5 - h/4
		}
	}
	return cmplx.NaN()
}
