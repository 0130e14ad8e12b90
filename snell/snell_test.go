package snell

import (
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/domain"
)

const degree = math.Pi / 180

func minutes(degrees, arcminutes float64) float64 { return (degrees + arcminutes/60) * degree }

// must returns the value of a call that is expected to work.
func must[T any](value T, err error) T {
	if err != nil {
		panic(err)
	}
	return value
}

func TestCriticalAnglePublished(t *testing.T) {
	for _, c := range []struct {
		source         string
		n1, n2         float64
		want, halfUnit float64
	}{
		{"handbook value, water to air (from memory, recomputed)", 1.333, 1, 48.6, 0.05},
		{"Keiser, Optical Fiber Communications, ch. 2 (from memory, recomputed)", 1.48, 1.46, 80.57, 0.005},
		{"Senior, Optical Fiber Communications, ex. 2.1 (from memory, recomputed)", 1.50, 1.47, 78.5, 0.05},
		{"Senior, ex. 2.2, Delta = 1 % in the weak form (from memory, recomputed)", 1.46, 1.46 * 0.99, 81.9, 0.05},
	} {
		got, err := CriticalAngle(c.n1, c.n2)
		require.NoError(t, err, c.source)
		assert.InDelta(t, c.want, got/degree, c.halfUnit, c.source)
	}
}

// A pair of indices, the first above the second, as near as their last digit or
// as far as diamond and vacuum.
func randomPair(rnd *rand.Rand) (n1, n2 float64) {
	n2 = 1 + 2*rnd.Float64()
	n1 = n2 * (1 + math.Pow(10, -15.5+15.9*rnd.Float64()))
	if n1 == n2 {
		n1 = math.Nextafter(n2, 9)
	}
	return n1, n2
}

// The law of refraction at the critical angle: pi/2 at it, an error one step
// above, a refracted ray below. The way back of a grazing ray is the same angle.
func TestRefractAtCritical(t *testing.T) {
	rnd := rand.New(rand.NewPCG(1, 2))
	for range 20000 {
		n1, n2 := randomPair(rnd)
		critical := must(CriticalAngle(n1, n2))
		got, err := Refract(n1, n2, critical)
		require.NoError(t, err, "%v %v", n1, n2)
		require.Equal(t, math.Pi/2, got, "%v %v", n1, n2)

		_, err = Refract(n1, n2, math.Nextafter(critical, 9))
		require.ErrorIs(t, err, ErrTotalReflection, "%v %v", n1, n2)

		got, err = Refract(n1, n2, math.Nextafter(critical, 0))
		require.NoError(t, err, "%v %v", n1, n2)
		require.Less(t, math.Pi/2-got, 1e-6)

		back, err := Refract(n2, n1, math.Pi/2)
		require.NoError(t, err)
		require.Equal(t, critical, back, "%v %v", n1, n2)

		// Nearly grazing rays never come back as totally reflected.
		inside, err := Refract(n2, n1, math.Pi/2-math.Pow(10, -17+16*rnd.Float64()))
		require.NoError(t, err)
		require.LessOrEqual(t, inside, critical)
		_, err = Refract(n1, n2, inside)
		require.NoError(t, err, "%v %v %v", n1, n2, inside)
	}
}

func TestRefractLaw(t *testing.T) {
	rnd := rand.New(rand.NewPCG(3, 4))
	for range 5000 {
		n2, n1 := randomPair(rnd) // into the denser medium: well conditioned
		in := math.Pi / 2 * rnd.Float64()
		out := must(Refract(n1, n2, in))
		require.InEpsilon(t, n1*math.Sin(in), n2*math.Sin(out), 1e-15)
		back := must(Refract(n2, n1, out))
		// Both calls err by up to 4 epsilon; the way back enlarges the first error.
		enlarge := n2 * math.Cos(out) / (n1 * math.Cos(in))
		require.InDelta(t, in, back, 4*epsilon*(in+out*enlarge))
	}
	// Small angles: the ratio of the angles is that of the indices.
	for _, in := range []float64{1e-9, 1e-100, 1e-300} {
		require.InEpsilon(t, in/1.5, must(Refract(1, 1.5, in)), 1e-15)
		require.InEpsilon(t, in*1.5, must(Refract(1.5, 1, in)), 1e-15)
	}
	assert.Zero(t, must(Refract(1, 1.5, 0)))
	assert.Equal(t, 0.3, must(Refract(1.5, 1.5, 0.3)))
	assert.Equal(t, math.Pi/2, must(Refract(1.5, 1.5, math.Pi/2)))
}

func TestBrewster(t *testing.T) {
	// Air to glass of 1.5: 56.3 degrees (Hecht, Optics, from memory, recomputed).
	assert.InDelta(t, 56.3, must(Brewster(1, 1.5))/degree, 0.05)
	for _, n := range [][2]float64{{1, 1.5}, {1.5, 1}, {1.45, 1.4500001}, {1, 4}} {
		angle := must(Brewster(n[0], n[1]))
		out := must(Refract(n[0], n[1], angle))
		assert.InDelta(t, math.Pi/2, angle+out, 4e-16, "the reflected and refracted rays are square")
		c := must(Fresnel(n[0], complex(n[1], 0), angle))
		// The angle is rounded, so the reflection is not 0 but below its rounding.
		assert.Less(t, c.P.Reflectance, 1e-31)
		assert.Greater(t, c.S.Reflectance, 0.0)
	}
}

func TestErrors(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	film := Film{1.38, 1e-7}
	type call func() error
	refract := func(n1, n2, in float64) call {
		return func() error { _, err := Refract(n1, n2, in); return err }
	}
	for _, c := range []struct {
		name, argument string
		call           call
		kind           error
	}{
		{"index zero", "n1", refract(0, 1, 0), nil},
		{"index NaN", "n1", refract(nan, 1, 0), nil},
		{"index infinite", "n2", refract(1, inf, 0), nil},
		{"index negative", "n2", refract(1, -1, 0), nil},
		{"index absurd", "n2", refract(1, 1e41, 0), nil},
		{"angle NaN", "incidence", refract(1, 1.5, nan), nil},
		{"angle negative", "incidence", refract(1, 1.5, -1e-300), nil},
		{"angle above pi/2", "incidence", refract(1, 1.5, math.Nextafter(math.Pi/2, 2)), nil},
		{"beyond critical", "incidence", refract(1.5, 1, 0.8), ErrTotalReflection},
		{"no critical angle", "n1", func() error { _, err := CriticalAngle(1, 1.5); return err }, ErrNoTotalReflection},
		{"equal indices", "n1", func() error { _, err := CriticalAngle(1.5, 1.5); return err }, ErrNoTotalReflection},
		{"critical angle of nothing", "n2", func() error { _, err := CriticalAngle(1.5, 0); return err }, nil},
		{"Brewster", "n2", func() error { _, err := Brewster(1.5, nan); return err }, nil},
		{"phase below critical", "incidence", func() error { _, err := TotalReflectionPhase(1.5, 1, 0.7); return err }, ErrNoTotalReflection},
		{"phase into denser", "n1", func() error { _, err := TotalReflectionPhase(1, 1.5, 1.5); return err }, ErrNoTotalReflection},
		{"phase NaN", "incidence", func() error { _, err := TotalReflectionPhase(1.5, 1, nan); return err }, nil},
		{"depth at critical", "incidence", func() error {
			_, err := PenetrationDepth(2, 1.9999999999999998, must(CriticalAngle(2, 1.9999999999999998)), 1e-6)
			return err
		}, ErrNoTotalReflection},
		{"depth wavelength", "wavelength", func() error { _, err := PenetrationDepth(1.5, 1, 1, 0); return err }, nil},
		{"depth overflow", "penetration depth (result)", func() error {
			_, err := PenetrationDepth(2e-40, 1e-40, 1.5, math.MaxFloat64)
			return err
		}, nil},
		{"shift wavelength", "wavelength", func() error { _, _, err := LateralShift(1.5, 1, 1, -1); return err }, nil},
		{"shift overflow", "lateral shift (result)", func() error { _, _, err := LateralShift(1.5, 1, math.Pi/2, 1e300); return err }, nil},
		{"Fresnel first", "n1", func() error { _, err := Fresnel(-1, 1, 0); return err }, nil},
		{"Fresnel gain", "imaginary part of n2", func() error { _, err := Fresnel(1, 1.5-1i, 0); return err }, nil},
		{"Fresnel real part", "real part of n2", func() error { _, err := Fresnel(1, -1.5+1i, 0); return err }, nil},
		{"Fresnel nothing", "n2", func() error { _, err := Fresnel(1, 0, 0); return err }, nil},
		{"Fresnel angle", "incidence", func() error { _, err := Fresnel(1, 1.5, 2); return err }, nil},
		{"zero Stack", "Entrance", func() error { _, err := Stack{}.At(1e-6, 0); return err }, nil},
		{"Stack exit", "Exit", func() error { _, err := Stack{Entrance: 1}.At(1e-6, 0); return err }, nil},
		{"Stack wavelength", "wavelength", func() error { _, err := Stack{1, nil, 1}.At(nan, 0); return err }, nil},
		{"Stack angle", "incidence", func() error { _, err := Stack{1, nil, 1}.At(1e-6, 1.6); return err }, nil},
		{"Stack film gain", "imaginary part of Films[1].Index", func() error { _, err := Stack{1, []Film{film, {1 - 1i, 1e-7}}, 1}.At(1e-6, 0); return err }, nil},
		{"Stack film thickness", "Films[1].Thickness", func() error { _, err := Stack{1, []Film{film, {1, nan}}, 1}.At(1e-6, 0); return err }, nil},
		{"Stack phase", "Films[0].Thickness", func() error { _, err := Stack{1, []Film{{1, 1e300}}, 1}.At(1e-300, 0); return err }, nil},
		{"cleaved end", "fibre", func() error { _, err := CleavedEnd(0, 1); return err }, nil},
		{"cleaved end outside", "outside", func() error { _, err := CleavedEnd(1, inf); return err }, nil},
		{"zero Joint", "First", func() error { _, err := Joint{}.Incoherent(); return err }, nil},
		{"Joint filling", "Filling", func() error { _, err := Joint{1, 0, 1}.Coherent(0, 1); return err }, nil},
		{"Joint second", "Second", func() error { _, err := AirGap(1, -1).Coherent(0, 1); return err }, nil},
		{"Joint gap", "gap", func() error { _, err := AirGap(1.5, 1.5).Coherent(-1, 1); return err }, nil},
		{"Joint wavelength", "wavelength", func() error { _, err := AirGap(1.5, 1.5).Coherent(1, 0); return err }, nil},
		{"Joint phase", "phase across the gap (result)", func() error { _, err := AirGap(1.5, 1.5).Coherent(1e300, 1e-300); return err }, nil},
		{"quarter wave", "index", func() error { _, err := QuarterWave(0, 1); return err }, nil},
		{"quarter wave wavelength", "wavelength", func() error { _, err := QuarterWave(1.38, inf); return err }, nil},
		{"quarter wave overflow", "thickness (result)", func() error { _, err := QuarterWave(1e-40, 1e300); return err }, nil},
		{"anti-reflection", "n2", func() error { _, err := AntiReflection(1, 0, 1); return err }, nil},
		{"anti-reflection wavelength", "wavelength", func() error { _, err := AntiReflection(1, 1.5, 0); return err }, nil},
		{"coated fibre", "fibre", func() error { _, err := Coated(0, film, 1, 1); return err }, nil},
		{"coated zero film", "coating.Index", func() error { _, err := Coated(1.5, Film{}, 1, 1); return err }, nil},
		{"coated thickness", "coating.Thickness", func() error { _, err := Coated(1.5, Film{1, -1}, 1, 1); return err }, nil},
		{"coated outside", "outside", func() error { _, err := Coated(1.5, film, nan, 1); return err }, nil},
		{"coated wavelength", "wavelength", func() error { _, err := Coated(1.5, film, 1, 0); return err }, nil},
		{"zero Powers", "sum of the powers", func() error { _, err := Powers{}.ReturnLoss(); return err }, nil},
		{"Powers out of range", "Transmittance", func() error { _, err := Powers{0.5, 1.5, -1}.InsertionLoss(); return err }, nil},
		{"no reflection", "Reflectance", func() error { _, err := Powers{0, 1, 0}.ReturnLoss(); return err }, ErrNoPower},
		{"no transmission", "Transmittance", func() error { _, err := Powers{1, 0, 0}.InsertionLoss(); return err }, ErrNoPower},
	} {
		err := c.call()
		var refused *domain.Error
		if assert.ErrorAs(t, err, &refused, c.name) {
			assert.Equal(t, c.argument, refused.Argument, c.name)
			assert.NotEmpty(t, refused.Allowed, c.name)
			assert.Contains(t, refused.Func, "snell.", c.name)
			assert.Equal(t, c.kind, refused.Kind, c.name)
		}
	}
}
