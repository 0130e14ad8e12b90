package snell

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// Silica at 1550 nm: Malitson, J. Opt. Soc. Am. 55, 1205 (1965).
const silica = 1.44402

// A doped core at 1550 nm, about 0.36 % above silica (common practice).
const core = 1.4502

func TestCleavedEndPublished(t *testing.T) {
	// Return loss of a clean silica end in air: 14.7 to 14.8 dB (common practice),
	// the lower for a core's index, the upper for the bare glass.
	for _, c := range []struct{ index, want float64 }{{core, 14.7}, {silica, 14.8}} {
		loss := must(must(CleavedEnd(c.index, 1)).ReturnLoss())
		assert.InDelta(t, c.want, loss, 0.05)
	}
	assert.InDelta(t, 0.04, must(CleavedEnd(1.5, 1)).Reflectance, 1e-16) // any optics handbook
	// The same as Fresnel's at normal incidence.
	for _, outside := range []float64{1, 1.33, 1.444019999, 3.5} {
		got, want := must(CleavedEnd(silica, outside)), must(Fresnel(silica, complex(outside, 0), 0))
		assert.InEpsilon(t, want.S.Reflectance, got.Reflectance, 1e-14)
		assert.InEpsilon(t, want.S.Transmittance, got.Transmittance, 1e-14)
	}
}

func TestAirGapPublished(t *testing.T) {
	// Two faces, incoherent: about 0.3 dB for silica (common practice).
	p := must(AirGap(silica, silica).Incoherent())
	assert.InDelta(t, 0.3, must(p.InsertionLoss()), 0.05)
	// With equal fibres R = 2 R1/(1 + R1).
	one := must(CleavedEnd(silica, 1)).Reflectance
	assert.InEpsilon(t, 2*one/(1+one), p.Reflectance, 1e-14)
}

func TestJointAgainstStack(t *testing.T) {
	for _, j := range []Joint{AirGap(silica, silica), AirGap(silica, 1.5), {silica, 1.46, core}, {1.4, 3.5, 1.4}, {1, 1.2, 1.44}} {
		for _, gap := range []float64{0, 1e-9, 1.7e-7, 387.5e-9, 1e-5} {
			got := must(j.Coherent(gap, 1550e-9))
			want := must(Stack{j.First, []Film{{complex(j.Filling, 0), gap}}, complex(j.Second, 0)}.At(1550e-9, 0))
			assert.InDelta(t, want.S.Reflectance, got.Reflectance, 1e-14)
			assert.InEpsilon(t, want.S.Transmittance, got.Transmittance, 1e-13)
		}
	}
}

// The mean over the phase of the gap is the incoherent sum, exactly so; the mean
// of equidistant samples of a smooth periodic function converges geometrically.
func TestIncoherentIsMeanOfCoherent(t *testing.T) {
	for _, j := range []Joint{AirGap(silica, silica), AirGap(silica, 1.5), {silica, 1.46, core}, {1.4, 3.5, 1.6}} {
		const samples = 400
		var mean Powers
		for k := range samples {
			p := must(j.Coherent(float64(k)/samples/2/j.Filling, 1))
			mean.Reflectance += p.Reflectance / samples
			mean.Transmittance += p.Transmittance / samples
		}
		sum := must(j.Incoherent())
		assert.InEpsilon(t, mean.Reflectance, sum.Reflectance, 1e-12)
		assert.InEpsilon(t, mean.Transmittance, sum.Transmittance, 1e-12)
	}
}

func TestJointLimits(t *testing.T) {
	// Equal fibres in contact: nothing comes back, and the return loss says so.
	contact := must(AirGap(silica, silica).Coherent(0, 1550e-9))
	assert.Equal(t, Powers{Transmittance: 1}, contact)
	_, err := contact.ReturnLoss()
	assert.ErrorIs(t, err, ErrNoPower)
	// A half wave of air is as good as contact, a quarter wave the worst:
	// ((n^2 - 1)/(n^2 + 1))^2.
	assert.Less(t, must(AirGap(silica, silica).Coherent(775e-9, 1550e-9)).Reflectance, 1e-30)
	quarter := must(AirGap(silica, silica).Coherent(387.5e-9, 1550e-9))
	n2 := silica * silica
	assert.InEpsilon(t, math.Pow((n2-1)/(n2+1), 2), quarter.Reflectance, 1e-14)
	// A gel 1e-7 from the fibre's index leaves (dn/n)^2 at a quarter wave, digits kept.
	gel := silica + 1e-7
	got := must(Joint{silica, gel, silica}.Coherent(1550e-9/4/gel, 1550e-9))
	assert.InEpsilon(t, math.Pow((gel-silica)*(gel+silica)/(gel*gel+silica*silica), 2), got.Reflectance, 1e-13)
	// Faces that reflect nearly all still leave the balance.
	extreme := must(Joint{1e40, 1e-40, 1e40}.Incoherent())
	assert.InEpsilon(t, 2e-80, extreme.Transmittance, 1e-14) // T1/2 with T1 = 4e-80
}

func TestAntiReflection(t *testing.T) {
	film := must(AntiReflection(silica, 1, 1550e-9))
	assert.InEpsilon(t, math.Sqrt(silica), real(film.Index), 1e-15)
	assert.InEpsilon(t, 1550e-9/4/math.Sqrt(silica), film.Thickness, 1e-15)
	assert.Less(t, must(Coated(silica, film, 1, 1550e-9)).Reflectance, 1e-30)
	// Off its wavelength the ideal film reflects, and at half of it the end is bare.
	bare := must(CleavedEnd(silica, 1))
	assert.InEpsilon(t, bare.Reflectance, must(Coated(silica, film, 1, 775e-9)).Reflectance, 1e-13)
	assert.Greater(t, must(Coated(silica, film, 1, 1310e-9)).Reflectance, 1e-4)
	// A film of an index it ought not to have: ((n1 n3 - n2^2)/(n1 n3 + n2^2))^2.
	film = must(QuarterWave(1.38, 1550e-9))
	want := math.Pow((silica-1.38*1.38)/(silica+1.38*1.38), 2)
	assert.InEpsilon(t, want, must(Coated(silica, film, 1, 1550e-9)).Reflectance, 1e-13)
	// An absorbing coating: nothing is lost from the account.
	p := must(Coated(silica, Film{0.5 + 11i, 10e-9}, 1, 1550e-9))
	require.Positive(t, p.Absorptance)
	assert.InDelta(t, 1, p.Reflectance+p.Transmittance+p.Absorptance, 1e-15)
}
