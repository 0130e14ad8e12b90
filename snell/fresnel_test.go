package snell

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestNormalIncidencePublished(t *testing.T) {
	// 4.0 %: any optics handbook.
	c := must(Fresnel(1, 1.5, 0))
	assert.InDelta(t, 0.04, c.S.Reflectance, 1e-16)
	assert.Equal(t, c.S.Powers, c.P.Powers)
	assert.Equal(t, c.S.Reflection, -c.P.Reflection)
	assert.InDelta(t, -0.2, real(c.S.Reflection), 1e-16) // half a wave lost into the denser medium
	assert.InDelta(t, 0.8, real(c.S.Transmission), 1e-15)

	// Metals at 589.3 nm: Born and Wolf, section 14.2, table of optical constants
	// n and n kappa with the reflectance (from memory, recomputed).
	for _, metal := range []struct {
		name  string
		index complex128
		want  float64
	}{
		{"sodium", 0.044 + 2.42i, 0.97},
		{"silver", 0.20 + 3.44i, 0.94},
		{"aluminium", 1.44 + 5.23i, 0.83},
		{"gold", 0.47 + 2.83i, 0.82},
		{"copper", 0.62 + 2.57i, 0.73},
	} {
		got := must(Fresnel(1, metal.index, 0)).S.Reflectance
		assert.InDelta(t, metal.want, got, 0.0051, metal.name)
	}
}

// The textbook quotients, which lose digits where the package's own do not, at
// angles where they do not either.
func TestFresnelTextbook(t *testing.T) {
	rnd := rand.New(rand.NewPCG(5, 6))
	for range 3000 {
		n1, n2 := 1+rnd.Float64(), complex(0.1+4*rnd.Float64(), 0)
		if rnd.IntN(2) == 0 {
			n2 += complex(0, 5*rnd.Float64())
		}
		angle := 1.5 * rnd.Float64()
		cos1 := complex(math.Cos(angle), 0)
		sin := complex(n1*math.Sin(angle), 0) / n2
		cos2 := cmplx.Sqrt(1 - sin*sin)
		if imag(n2*cos2) < 0 {
			cos2 = -cos2
		}
		a, b := complex(n1, 0), n2
		c := must(Fresnel(n1, n2, angle))
		near := func(want, got complex128) {
			t.Helper()
			require.InDelta(t, 0, cmplx.Abs(want-got), 2e-13, "%v %v %v", n1, n2, angle)
		}
		near((a*cos1-b*cos2)/(a*cos1+b*cos2), c.S.Reflection)
		near((b*cos1-a*cos2)/(b*cos1+a*cos2), c.P.Reflection)
		near(2*a*cos1/(a*cos1+b*cos2), c.S.Transmission)
		near(2*a*cos1/(b*cos1+a*cos2), c.P.Transmission)
	}
}

// Power conservation from the amplitudes, which the powers' own sum would not
// prove: |r|^2 + flux ratio |t|^2 = 1, absorbing media included.
func TestFresnelConservesPower(t *testing.T) {
	rnd := rand.New(rand.NewPCG(7, 8))
	for range 3000 {
		n1, a := randomPair(rnd)
		if rnd.IntN(2) == 0 {
			n1, a = a, n1
		}
		n2 := complex(a, float64(rnd.IntN(2))*10*rnd.Float64())
		angle := math.Pi / 2 * rnd.Float64()
		c := must(Fresnel(n1, n2, angle))
		r := newRay(n1, angle)
		k2 := r.normal(n2)
		s := real(k2) / r.kz
		p := real(cmplx.Conj(n2)*n2*k2/(n2*n2)) / r.kz // of the electric fields: |n2|^2 Re(k2/n2^2)
		require.InDelta(t, 1, norm(c.S.Reflection)+s*norm(c.S.Transmission), 6e-15, "%v %v %v", n1, n2, angle)
		require.InDelta(t, 1, norm(c.P.Reflection)+p*norm(c.P.Transmission), 6e-15, "%v %v %v", n1, n2, angle)
		for _, w := range []Polarised{c.S, c.P} {
			require.Equal(t, 1.0, w.Reflectance+w.Transmittance)
			require.Zero(t, w.Absorptance)
			require.InDelta(t, norm(w.Reflection), w.Reflectance, 6e-15)
		}
	}
}

// G. G. Stokes, Camb. Dublin Math. J. 4, 1 (1849): for the two directions through
// one face r' = -r and t t' = 1 - r^2; hence the same transmittance both ways.
func TestStokesRelations(t *testing.T) {
	rnd := rand.New(rand.NewPCG(9, 10))
	for range 3000 {
		n2, n1 := randomPair(rnd)
		in := 1.55 * rnd.Float64()
		out := must(Refract(n1, n2, in))
		forth, back := must(Fresnel(n1, complex(n2, 0), in)), must(Fresnel(n2, complex(n1, 0), out))
		for _, w := range [][2]Polarised{{forth.S, back.S}, {forth.P, back.P}} {
			// The way back starts from a rounded angle.
			require.InDelta(t, real(w[0].Reflection), -real(w[1].Reflection), 1e-13)
			require.InDelta(t, 1-norm(w[0].Reflection), real(w[0].Transmission*w[1].Transmission), 1e-13)
			require.InDelta(t, w[0].Transmittance, w[1].Transmittance, 1e-13)
		}
	}
}

func TestFresnelLimits(t *testing.T) {
	grazing := must(Fresnel(1, 1.5, math.Pi/2))
	assert.InDelta(t, -1, real(grazing.S.Reflection), 1e-15)
	assert.InDelta(t, -1, real(grazing.P.Reflection), 1e-15)
	nothing := must(Fresnel(1.5, 1.5, 0.7))
	assert.Zero(t, nothing.S.Reflectance)
	assert.Zero(t, nothing.P.Reflectance)
	assert.Equal(t, 1.0, nothing.S.Transmittance)
	assert.InDelta(t, 1, real(nothing.P.Transmission), 1e-15)
	// A lossless plasma, real part 0, reflects everything.
	plasma := must(Fresnel(1, 2i, 0.5))
	assert.Equal(t, 1.0, plasma.S.Reflectance)
	assert.Equal(t, 1.0, plasma.P.Reflectance)
	assert.Equal(t, Powers{Reflectance: 1}, plasma.Unpolarised())
	// Weak contrast: R = (dn/2n)^2 for dn/n = 2e-10, to its last digits.
	index := 1.0000000002
	weak := must(Fresnel(1, complex(index, 0), 0))
	dn := index - 1
	assert.InEpsilon(t, dn*dn/(2+dn)/(2+dn), weak.S.Reflectance, 1e-15)
}

func TestDecibels(t *testing.T) {
	// 4 % reflected is 13.98 dB (10 log10 25), and costs 0.177 dB.
	p := Powers{Reflectance: 0.04, Transmittance: 0.96}
	assert.InEpsilon(t, 10*math.Log10(25), must(p.ReturnLoss()), 1e-15)
	assert.InEpsilon(t, -10*math.Log10(0.96), must(p.InsertionLoss()), 1e-14)
	// A small loss keeps its digits: 1e-12 is 4.342944819e-12 dB.
	p = Powers{Reflectance: 1e-12, Transmittance: 1 - 1e-12}
	assert.InEpsilon(t, 10/math.Ln10*1e-12, must(p.InsertionLoss()), 1e-11)
	// Total reflection loses nothing on the way back.
	loss := must(Powers{Reflectance: 1}.ReturnLoss())
	assert.Zero(t, loss)
	assert.False(t, math.Signbit(loss))
}
