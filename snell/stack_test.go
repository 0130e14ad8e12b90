package snell

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// near compares amplitudes to an absolute difference.
func near(t *testing.T, want, got complex128, limit float64, args ...any) {
	t.Helper()
	require.InDelta(t, 0, cmplx.Abs(want-got), limit, args...)
}

// G. B. Airy's sum (1833; Born and Wolf, section 7.6.1) of the reflections to and
// fro in one film, from Fresnel's coefficients of its two faces: another method
// than the matrices.
func TestStackAgainstAirySum(t *testing.T) {
	rnd := rand.New(rand.NewPCG(11, 12))
	for range 3000 {
		n0, n1 := 1+rnd.Float64(), 1+2*rnd.Float64()
		exit := complex(0.2+3*rnd.Float64(), float64(rnd.IntN(2))*4*rnd.Float64())
		angle, h, wavelength := 1.5*rnd.Float64(), 2e-6*rnd.Float64(), 1e-6
		if math.Abs(n0*math.Sin(angle)-n1) < 0.01 {
			continue // the sum itself loses digits where the field in the film is linear
		}
		c := must(Stack{n0, []Film{{complex(n1, 0), h}}, exit}.At(wavelength, angle))

		kx := complex(n0*math.Sin(angle), 0)
		k := func(n complex128) complex128 {
			k := cmplx.Sqrt(n*n - kx*kx)
			if imag(k) < 0 {
				k = -k
			}
			return k
		}
		k0, k1, k2 := k(complex(n0, 0)), k(complex(n1, 0)), k(exit)
		e := cmplx.Exp(2i * math.Pi * k1 * complex(h/wavelength, 0))
		sum := func(a0, a1, a2 complex128) (r, t complex128) { // a: kz, or kz/n^2
			r01, r12 := (a0-a1)/(a0+a1), (a1-a2)/(a1+a2)
			t01, t12 := 2*a0/(a0+a1), 2*a1/(a1+a2)
			return (r01 + r12*e*e) / (1 + r01*r12*e*e), t01 * t12 * e / (1 + r01*r12*e*e)
		}
		limit := 1e-12
		r, through := sum(k0, k1, k2)
		near(t, r, c.S.Reflection, limit)
		near(t, through, c.S.Transmission, limit)
		m := func(n float64) complex128 { return complex(n*n, 0) }
		r, through = sum(k0/m(n0), k1/m(n1), k2/(exit*exit))
		near(t, r, c.P.Reflection, limit)
		near(t, through*complex(n0, 0)/exit, c.P.Transmission, limit)
	}
}

// One quarter wave of magnesium fluoride (1.38) on glass: 1.4 % for glass of 1.5
// (handbook), and 1.26 % for 1.52, from ((n1 n3 - n2^2)/(n1 n3 + n2^2))^2 (Born
// and Wolf, section 1.6.4), where bare glass reflects over 4 %.
func TestSingleLayerCoating(t *testing.T) {
	for _, c := range []struct{ glass, want, half float64 }{{1.5, 0.0141, 0.00005}, {1.52, 0.0126, 0.00005}} {
		film := must(QuarterWave(1.38, 550e-9))
		got := must(Stack{1, []Film{film}, complex(c.glass, 0)}.At(550e-9, 0))
		assert.InDelta(t, c.want, got.S.Reflectance, c.half)
		exact := (c.glass - 1.38*1.38) / (c.glass + 1.38*1.38)
		assert.InEpsilon(t, exact*exact, got.S.Reflectance, 1e-14)
	}
}

// Quarter-wave pairs of high and low index H L on glass, N pairs and one more H:
// R = ((1 - a)/(1 + a))^2, a = (H/n1)(H/glass)(H/L)^(2N) (Born and Wolf, section
// 1.6.5). Their zinc sulphide and cryolite, 2.3 and 1.35 on 1.52, alone reflect
// 0.306, and five layers 0.872 (from memory, recomputed).
func TestQuarterWavePairs(t *testing.T) {
	const wavelength = 546e-9
	high, low := must(QuarterWave(2.3, wavelength)), must(QuarterWave(1.35, wavelength))
	films := []Film{high}
	published := map[int]float64{0: 0.306, 2: 0.872}
	for pairs := range 60 {
		c := must(Stack{1, films, 1.52}.At(wavelength, 0))
		a := 2.3 * 2.3 / 1.52 * math.Pow(2.3/1.35, 2*float64(pairs))
		assert.InEpsilon(t, 4*a/(1+a)/(1+a), c.S.Transmittance, 1e-13*float64(pairs+1), pairs)
		assert.InDelta(t, norm(c.S.Reflection), c.S.Reflectance, 1e-14)
		if want, ok := published[pairs]; ok {
			assert.InDelta(t, want, c.S.Reflectance, 0.0006)
		}
		films = append(films, low, high)
	}
}

// Frustrated total reflection between equal media in closed form: for S waves
// 1/T = 1 + ((k^2 + d^2)/(2 k d))^2 sinh^2(2 pi d gap/wavelength), with d the
// decay (textbook quantum barrier, and Born and Wolf's film with an imaginary kz).
func TestFrustratedTotalReflection(t *testing.T) {
	const n, angle, wavelength = 1.5, 0.9, 1e-6
	k := n * math.Cos(angle)
	d := math.Sqrt(math.Pow(n*math.Sin(angle), 2) - 1)
	for _, gap := range []float64{0, 1e-12, 1e-9, 1e-7, 1e-6, 1e-5} {
		c := must(Stack{n, []Film{{1, gap}}, n}.At(wavelength, angle))
		x := (k*k + d*d) / (2 * k * d) * math.Sinh(2*math.Pi*d*gap/wavelength)
		assert.InEpsilon(t, 1/(1+x*x), c.S.Transmittance, 1e-13, gap)
		if gap > 0 {
			assert.InEpsilon(t, x*x/(1+x*x), c.S.Reflectance, 1e-13, gap)
		}
	}
	// A metre of air is total reflection, without overflow.
	wide := must(Stack{n, []Film{{1, 1}}, n}.At(wavelength, angle))
	total := must(Fresnel(n, 1, angle))
	near(t, total.S.Reflection, wide.S.Reflection, 2e-15)
	near(t, total.P.Reflection, wide.P.Reflection, 2e-15)
	assert.Equal(t, Powers{Reflectance: 1}, wide.P.Powers)
}

// A film so thick that nothing comes back is a half-space.
func TestThickAbsorbingFilm(t *testing.T) {
	for _, index := range []complex128{0.06 + 4.2i, 1.6 + 0.5i, 3i, 1e-3 + 1e-3i} {
		for _, angle := range []float64{0, 0.7, 1.5, math.Pi/2 - 1e-9} {
			bare := must(Fresnel(1.4, index, angle))
			thick := must(Stack{1.4, []Film{{index, 1}}, 1}.At(633e-9, angle))
			near(t, bare.S.Reflection, thick.S.Reflection, 3e-15)
			near(t, bare.P.Reflection, thick.P.Reflection, 3e-15)
			assert.Zero(t, thick.S.Transmittance)
			assert.InDelta(t, bare.P.Transmittance, thick.P.Absorptance, 3e-15)
		}
	}
}

// Power falls as exp(-4 pi kappa z/wavelength) (P. Bouguer's law, and the meaning
// of the index's imaginary part; Born and Wolf, section 14.1): the ratio of two
// thick films, whose faces cancel out of it.
func TestBouguerLaw(t *testing.T) {
	const kappa, wavelength = 0.3, 1e-6
	through := func(h float64) float64 {
		return must(Stack{1, []Film{{1.5 + kappa*1i, h}}, 1.5}.At(wavelength, 0)).S.Transmittance
	}
	assert.InEpsilon(t, math.Exp(-4*math.Pi*kappa), through(11e-6)/through(10e-6), 1e-13)
}

// What must change nothing: no film, films of no thickness, a film cut in two, a
// half wave at its wavelength, a film of the entrance medium (but for phase).
func TestStackIdentities(t *testing.T) {
	const wavelength = 1e-6
	exit := 1.52 + 0.1i
	for _, angle := range []float64{0, 0.6, 1.2, 1.57} {
		bare := must(Fresnel(1.1, exit, angle))
		assert.Equal(t, bare, must(Stack{1.1, nil, exit}.At(wavelength, angle)))
		none := must(Stack{1.1, []Film{{2, 0}, {3 + 1i, 0}}, exit}.At(wavelength, angle))
		near(t, bare.S.Reflection, none.S.Reflection, 2e-15)
		near(t, bare.P.Transmission, none.P.Transmission, 2e-15)
		assert.Zero(t, none.P.Absorptance)

		whole := must(Stack{1.1, []Film{{2 + 0.3i, 3e-7}}, exit}.At(wavelength, angle))
		cut := must(Stack{1.1, []Film{{2 + 0.3i, 1e-7}, {2 + 0.3i, 2e-7}}, exit}.At(wavelength, angle))
		near(t, whole.S.Reflection, cut.S.Reflection, 3e-15)
		near(t, whole.P.Reflection, cut.P.Reflection, 3e-15)
		near(t, whole.P.Transmission, cut.P.Transmission, 3e-15)

		inside := must(Refract(1.1, 2.2, angle))
		half := must(Stack{1.1, []Film{{2.2, wavelength / 2 / 2.2 / math.Cos(inside)}}, exit}.At(wavelength, angle))
		near(t, bare.S.Reflection, half.S.Reflection, 5e-15)
		near(t, -bare.P.Transmission, half.P.Transmission, 5e-15)

		ahead := must(Stack{1.1, []Film{{1.1, 2e-7}}, exit}.At(wavelength, angle))
		turn := cmplx.Rect(1, 2*math.Pi*1.1*math.Cos(angle)*2e-7/wavelength)
		near(t, bare.S.Reflection*turn*turn, ahead.S.Reflection, 3e-15)
		near(t, bare.P.Transmission*turn, ahead.P.Transmission, 3e-15)
	}
}

// Reciprocity: the same transmittance both ways, absorbing films included
// (H. A. Lorentz's theorem); and the power balance from the amplitudes where
// nothing absorbs.
func TestStackReciprocity(t *testing.T) {
	rnd := rand.New(rand.NewPCG(13, 14))
	for range 1000 {
		n0, n1 := 1+rnd.Float64(), 1+rnd.Float64()
		if n0 > n1 {
			n0, n1 = n1, n0
		}
		absorbing := rnd.IntN(2) == 0
		var films []Film
		for range 1 + rnd.IntN(5) {
			f := Film{complex(1+2*rnd.Float64(), 0), 1e-6 * rnd.Float64()}
			if absorbing {
				f.Index += complex(0, rnd.Float64())
			}
			films = append(films, f)
		}
		in := 1.4 * rnd.Float64()
		out := must(Refract(n0, n1, in))
		forth := must(Stack{n0, films, complex(n1, 0)}.At(1e-6, in))
		slices.Reverse(films)
		back := must(Stack{n1, films, complex(n0, 0)}.At(1e-6, out))
		require.InEpsilon(t, forth.S.Transmittance, back.S.Transmittance, 1e-10)
		require.InEpsilon(t, forth.P.Transmittance, back.P.Transmittance, 1e-10)
		if absorbing {
			require.Positive(t, forth.S.Absorptance)
			continue
		}
		require.Zero(t, forth.S.Absorptance)
		flux := n1 * math.Cos(out) / (n0 * math.Cos(in))
		require.InDelta(t, 1, norm(forth.S.Reflection)+flux*norm(forth.S.Transmission), 1e-12)
		require.InDelta(t, 1, norm(forth.P.Reflection)+flux*norm(forth.P.Transmission), 1e-12)
	}
}

// Ten thousand pairs neither overflow nor leave the balance of power.
func TestStackOfManyFilms(t *testing.T) {
	s := mirror(10000)
	for _, angle := range []float64{0, 0.5, 1.5, math.Pi / 2} {
		c := must(s.At(550e-9, angle))
		assert.InDelta(t, 1, cmplx.Abs(c.S.Reflection), 1e-11)
		assert.InDelta(t, 1, c.P.Reflectance+c.P.Transmittance, 1e-15)
	}
}

// At a film's own critical angle kz in it is 0 and the field linear. With kz = 0
// for all digits the matrix is [1, -i 2 pi h/wavelength; 0, 1].
func TestFilmAtItsCriticalAngle(t *testing.T) {
	const wavelength, h = 1e-6, 3e-7
	r := newRay(1.5, 0.8)
	// The index n0 sin, rounded, leaves |kz| below 1e-7.
	l, ok := r.layer(Film{complex(r.kx, 1e-30), h}, wavelength)
	require.True(t, ok)
	assert.InDelta(t, 1, real(l.cosine), 1e-7)
	assert.InEpsilon(t, -2*math.Pi*h/wavelength, imag(l.over), 1e-7)
	// On both sides of the switch between series and quotient the layer is one.
	for _, index := range []complex128{1.5, 1.5 + 1i, 2i} {
		kz := r.normal(index)
		size := real(kz) + imag(kz)
		for _, factor := range []float64{0.999999, 1.000001} {
			h := 1e-6 * factor / size / (2 * math.Pi)
			l, ok := r.layer(Film{index, h}, 1)
			require.True(t, ok)
			near(t, 1, l.over*complex(0, 1)/complex(2*math.Pi*h, 0), 2e-6)
			// sin/kz against the series: over exp(-i phase) = -i h (1 - phase^2/6).
			phase := complex(2*math.Pi*h, 0) * kz
			near(t, 1-phase*phase/6, l.over*1i/l.decay/complex(2*math.Pi*h, 0), 5e-16)
		}
	}
}
