package snell

import (
	"math"
	"math/cmplx"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// Born and Wolf, Principles of Optics, section 1.5.4 (from memory, recomputed):
// glass of 1.51 retards by 45 degrees at 48 deg 37' and 54 deg 37', and at most
// by 45 deg 56', at 51 deg 20'.
func TestFresnelRhomb(t *testing.T) {
	difference := func(angle float64) float64 {
		return must(TotalReflectionPhase(1.51, 1, angle)).Difference / degree
	}
	assert.InDelta(t, 44.994, difference(minutes(48, 37)), 0.0005)
	assert.InDelta(t, 45.003, difference(minutes(54, 37)), 0.0005)
	assert.InDelta(t, 45+56.0/60, difference(minutes(51, 20)), 0.5/60)

	// The greatest: sin^2 = 2 n^2/(1 + n^2), tan(delta/2) = (1 - n^2)/(2 n), n = n2/n1
	// (same section).
	for _, n1 := range []float64{1.46, 1.51, 2.4} {
		n := 1 / n1
		angle := math.Asin(math.Sqrt(2 * n * n / (1 + n*n)))
		phase := must(TotalReflectionPhase(n1, 1, angle))
		assert.InEpsilon(t, (1-n*n)/(2*n), math.Tan(phase.Difference/2), 1e-14)
	}
}

// The phases are the arguments of Fresnel's coefficients, the difference is
// theirs, and all vanish at the critical angle.
func TestTotalReflectionPhaseAgainstFresnel(t *testing.T) {
	for _, n := range [][2]float64{{1.51, 1}, {1.48, 1.46}, {3.5, 1.44}} {
		critical := must(CriticalAngle(n[0], n[1]))
		for k := 1; k <= 200; k++ {
			angle := critical + (math.Pi/2-critical)*float64(k)/200
			phase := must(TotalReflectionPhase(n[0], n[1], angle))
			c := must(Fresnel(n[0], complex(n[1], 0), angle))
			require.InDelta(t, 1, cmplx.Abs(c.S.Reflection), 3e-15)
			require.InDelta(t, 1, cmplx.Abs(c.P.Reflection), 3e-15)
			require.InDelta(t, cmplx.Phase(c.S.Reflection), phase.S, 4e-15)
			require.InDelta(t, cmplx.Phase(c.P.Reflection), phase.P, 4e-15)
			require.InDelta(t, phase.S-phase.P, phase.Difference, 2e-15)
			require.Equal(t, Powers{Reflectance: 1}, c.S.Powers)
			require.Equal(t, Powers{Reflectance: 1}, c.P.Powers)
		}
		phase := must(TotalReflectionPhase(n[0], n[1], critical))
		assert.InDelta(t, 0, phase.S, 1e-6)
		assert.InDelta(t, 0, phase.P, 1e-6)
		phase = must(TotalReflectionPhase(n[0], n[1], math.Pi/2))
		assert.InDelta(t, -math.Pi, phase.S, 1e-15)
		assert.InDelta(t, -math.Pi, phase.P, 1e-15)
		assert.InDelta(t, 0, phase.Difference, 1e-15)
	}
}

// The power that crosses a wide evanescent gap falls as exp(-2 gap/depth).
func TestPenetrationDepthAgainstGap(t *testing.T) {
	const wavelength = 1550e-9
	for _, angle := range []float64{0.75, 0.9, 1.3, 1.55} {
		depth := must(PenetrationDepth(1.5, 1, angle, wavelength))
		through := func(gap float64) (s, p float64) {
			c := must(Stack{1.5, []Film{{1, gap}}, 1.5}.At(wavelength, angle))
			return c.S.Transmittance, c.P.Transmittance
		}
		s1, p1 := through(20 * depth)
		s2, p2 := through(21 * depth)
		assert.InEpsilon(t, math.Exp(-2), s2/s1, 1e-13)
		assert.InEpsilon(t, math.Exp(-2), p2/p1, 1e-13)
	}
	// At grazing incidence it is wavelength/(2 pi NA), the decay of a far cladding.
	assert.InEpsilon(t, wavelength/(2*math.Pi*math.Sqrt(1.48*1.48-1.46*1.46)),
		must(PenetrationDepth(1.48, 1.46, math.Pi/2, wavelength)), 1e-14)
}

// K. Artmann, Ann. Phys. 437, 87 (1948): the shift along the interface is minus
// the derivative of the phase with respect to kx. The derivative is a central
// difference here, good to about 1e-9.
func TestLateralShiftIsPhaseDerivative(t *testing.T) {
	const wavelength = 633e-9
	for _, n := range [][2]float64{{1.515, 1}, {1.48, 1.46}, {3.5, 1.44}} {
		critical := must(CriticalAngle(n[0], n[1]))
		for _, part := range []float64{0.02, 0.2, 0.5, 0.9} {
			angle := critical + part*(math.Pi/2-critical)
			h := 1e-5 * (angle - critical)
			before := must(TotalReflectionPhase(n[0], n[1], angle-h))
			after := must(TotalReflectionPhase(n[0], n[1], angle+h))
			s, p, err := LateralShift(n[0], n[1], angle, wavelength)
			require.NoError(t, err)
			perAngle := wavelength / (2 * math.Pi) / (n[0] * math.Cos(angle))
			assert.InEpsilon(t, -(after.S-before.S)/(2*h)*perAngle, s.Along, 1e-8)
			assert.InEpsilon(t, -(after.P-before.P)/(2*h)*perAngle, p.Along, 1e-8)
			assert.InEpsilon(t, s.Along*math.Cos(angle), s.Beam, 1e-14)
			assert.InEpsilon(t, p.Along*math.Cos(angle), p.Beam, 1e-14)
		}
		// Near the critical angle the two differ by 1/sin^2 = (n1/n2)^2 (Artmann 1948, from
		// memory).
		s, p, err := LateralShift(n[0], n[1], critical+1e-11, wavelength)
		require.NoError(t, err)
		assert.InEpsilon(t, n[0]*n[0]/(n[1]*n[1]), p.Beam/s.Beam, 1e-8)
	}
}
