package snell

import (
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"
)

var nasty = []float64{0, math.Copysign(0, -1), 1, 1.5, 1.46, -1, 5e-324, 2.3e-308, 1e-40, 1e-160, 1e40, 1e300,
	math.MaxFloat64, math.NaN(), math.Inf(1), math.Inf(-1), math.Pi / 2, 1.4062116403, 0.7297276562269663, 1e-9}

// seed adds rows of n values in which each nasty value comes at each place.
func seed(n int, add func(x []float64)) {
	plain := []float64{1.5, 1, 0.5, 1e-6, 1, 0.1, 1e-7, 1.3, 0, 2e-7}
	for i := range n {
		for _, v := range nasty {
			x := append([]float64(nil), plain[:n]...)
			x[i] = v
			add(x)
		}
	}
	for _, v := range nasty {
		x := make([]float64, n)
		for i := range x {
			x[i] = v
		}
		add(x)
	}
}

func finite(t *testing.T, err error, values ...float64) {
	t.Helper()
	if err != nil {
		return
	}
	for _, v := range values {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			t.Fatalf("not finite, without an error: %v", values)
		}
	}
}

func finiteCoefficients(t *testing.T, c Coefficients, err error) {
	t.Helper()
	for _, w := range []Polarised{c.S, c.P} {
		finite(t, err, real(w.Reflection), imag(w.Reflection), real(w.Transmission), imag(w.Transmission))
		validPowers(t, w.Powers, err)
	}
	if err == nil {
		validPowers(t, c.Unpolarised(), nil)
	}
}

func validPowers(t *testing.T, p Powers, err error) {
	t.Helper()
	if err != nil {
		return
	}
	finite(t, nil, p.Reflectance, p.Transmittance, p.Absorptance)
	if p.Reflectance < 0 || p.Transmittance < 0 || p.Absorptance < 0 || math.Abs(p.Reflectance+p.Transmittance+p.Absorptance-1) > 1e-15 {
		t.Fatalf("no account of the power: %+v", p)
	}
	loss, err := p.ReturnLoss()
	finite(t, err, loss)
	loss, err = p.InsertionLoss()
	finite(t, err, loss)
}

func FuzzAngles(f *testing.F) {
	seed(4, func(x []float64) { f.Add(x[0], x[1], x[2], x[3]) })
	f.Fuzz(func(t *testing.T, n1, n2, incidence, wavelength float64) {
		out, err := Refract(n1, n2, incidence)
		finite(t, err, out)
		if err == nil && !(out >= 0 && out <= math.Pi/2) {
			t.Fatalf("refraction %v", out)
		}
		critical, err := CriticalAngle(n1, n2)
		finite(t, err, critical)
		if err == nil {
			if got, err := Refract(n1, n2, critical); err != nil || got != math.Pi/2 {
				t.Fatalf("at the critical angle: %v %v", got, err)
			}
		}
		angle, err := Brewster(n1, n2)
		finite(t, err, angle)
		phase, err := TotalReflectionPhase(n1, n2, incidence)
		finite(t, err, phase.S, phase.P, phase.Difference)
		depth, err := PenetrationDepth(n1, n2, incidence, wavelength)
		finite(t, err, depth)
		s, p, err := LateralShift(n1, n2, incidence, wavelength)
		finite(t, err, s.Beam, s.Along, p.Beam, p.Along)
	})
}

func FuzzFresnel(f *testing.F) {
	seed(4, func(x []float64) { f.Add(x[0], x[1], x[3], x[2]) })
	f.Fuzz(func(t *testing.T, n1, re, im, incidence float64) {
		c, err := Fresnel(n1, complex(re, im), incidence)
		finiteCoefficients(t, c, err)
	})
}

func FuzzStack(f *testing.F) {
	seed(10, func(x []float64) { f.Add(x[0], x[1], x[8], x[2], x[3], x[4], x[5], x[6], x[7], x[9]) })
	f.Fuzz(func(t *testing.T, n0, exitRe, exitIm, incidence, wavelength, re1, im1, h1, re2, h2 float64) {
		s := Stack{n0, []Film{{complex(re1, im1), h1}, {complex(re2, 0), h2}}, complex(exitRe, exitIm)}
		c, err := s.At(wavelength, incidence)
		finiteCoefficients(t, c, err)
		s.Films = nil
		c, err = s.At(wavelength, incidence)
		finiteCoefficients(t, c, err)
	})
}

func FuzzEnds(f *testing.F) {
	seed(5, func(x []float64) { f.Add(x[0], x[1], x[4], x[3], x[2]) })
	f.Fuzz(func(t *testing.T, first, filling, second, gap, wavelength float64) {
		p, err := CleavedEnd(first, second)
		validPowers(t, p, err)
		j := Joint{first, filling, second}
		p, err = j.Coherent(gap, wavelength)
		validPowers(t, p, err)
		p, err = j.Incoherent()
		validPowers(t, p, err)
		p, err = AirGap(first, second).Coherent(gap, wavelength)
		validPowers(t, p, err)
		p, err = Coated(first, Film{complex(filling, gap), gap}, second, wavelength)
		validPowers(t, p, err)
		film, err := QuarterWave(filling, wavelength)
		finite(t, err, real(film.Index), film.Thickness)
		film, err = AntiReflection(first, second, wavelength)
		finite(t, err, real(film.Index), film.Thickness)
		loss, err := Powers{first, filling, second}.ReturnLoss()
		finite(t, err, loss)
		loss, err = Powers{first, filling, second}.InsertionLoss()
		finite(t, err, loss)
	})
}

// Arguments drawn over the whole of what is allowed, which a fuzzer's bits hit
// seldom: every call answers, and the account of the power closes.
func TestWholeDomain(t *testing.T) {
	rnd := rand.New(rand.NewPCG(15, 16))
	index := func() float64 {
		if rnd.IntN(2) == 0 {
			return 1 + rnd.Float64()
		}
		return math.Pow(10, -40+80*rnd.Float64())
	}
	complexIndex := func() complex128 {
		switch rnd.IntN(3) {
		case 0:
			return complex(index(), index())
		case 1:
			return complex(0, index())
		}
		return complex(index(), 0)
	}
	angle := func() float64 {
		a := math.Pow(10, -300*rnd.Float64()*float64(rnd.IntN(2)))
		if rnd.IntN(2) == 0 {
			return math.Pi/2 - a
		}
		return a
	}
	refused := 0
	for range 100000 {
		n1, n2, in := index(), index(), angle()
		c, err := Fresnel(n1, complexIndex(), in)
		require.NoError(t, err)
		finiteCoefficients(t, c, nil)
		s := Stack{Entrance: n1, Exit: complexIndex()}
		for range rnd.IntN(4) {
			s.Films = append(s.Films, Film{complexIndex(), math.Pow(10, -60+60*rnd.Float64())})
		}
		c, err = s.At(1e-6, in)
		finiteCoefficients(t, c, err)
		if err != nil {
			refused++
		}
		p, err := Joint{n1, n2, index()}.Coherent(1e-6*rnd.Float64(), 1e-6)
		require.NoError(t, err)
		validPowers(t, p, nil)
		p, err = Joint{n1, n2, index()}.Incoherent()
		require.NoError(t, err)
		validPowers(t, p, nil)
		if _, err = Refract(n1, n2, in); err != nil {
			require.ErrorIs(t, err, ErrTotalReflection)
		}
		if critical, err := CriticalAngle(n1, n2); err == nil {
			out, err := Refract(n1, n2, critical)
			require.NoError(t, err)
			require.Equal(t, math.Pi/2, out)
		}
	}
	t.Log("stacks refused: ", refused)
	require.Zero(t, refused)
}
