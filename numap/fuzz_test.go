package numap

import (
	"errors"
	"math"
	"testing"

	"glassthread/materials/domain"
)

// nasty values that seed every fuzz target.
var nasty = []float64{0, math.Copysign(0, -1), 1, -1, 1.5, math.NaN(), math.Inf(1), math.Inf(-1), 5e-324, 1e-310,
	1e-160, 1e160, math.MaxFloat64, -math.MaxFloat64, math.Nextafter(1, 2), math.Nextafter(1, 0), math.Pi / 2}

func seed(f *testing.F) {
	for i, x := range nasty {
		f.Add(x, 1.0, 1.0, 1.0, 1.0)
		f.Add(1.5, x, 1.0, 2.0, 1.0)
		f.Add(1.5, 1.0, x, 2.0, 1.0)
		f.Add(1.5, 1.0, 0.5, x, 1.0)
		f.Add(1.5, 1.0, 0.5, 2.0, x)
		f.Add(x, nasty[(i+5)%len(nasty)], nasty[(i+9)%len(nasty)], nasty[(i+3)%len(nasty)], x)
	}
	f.Add(25e-6, 0.2, 2.0, 20e-6, 1.0)
	f.Add(1.48, 1.46, 0.01, 1e-6, 0.5)
}

// inside fails unless there is an error that names function, argument and value, or a
// result between low and high.
func inside(t *testing.T, name string, low, high float64) func(float64, error) {
	return func(x float64, err error) {
		t.Helper()
		if err != nil {
			var refused *domain.Error
			if !errors.As(err, &refused) || refused.Func != "numap."+name || refused.Argument == "" {
				t.Errorf("%s: error %v", name, err)
			}
			return
		}
		if !(x >= low && x <= high) {
			t.Errorf("%s gives %v, not from %v to %v", name, x, low, high)
		}
	}
}

const most = math.MaxFloat64

func FuzzIndices(f *testing.F) {
	seed(f)
	f.Fuzz(func(t *testing.T, n1, n2, delta, _, _ float64) {
		inside(t, "NA", 0, n1)(NA(n1, n2))
		inside(t, "Delta", -most, 0.5)(Delta(n1, n2))
		inside(t, "DeltaWeak", -most, 1)(DeltaWeak(n1, n2))
		inside(t, "NAWeak", 0, n1)(NAWeak(n1, delta))
		inside(t, "CladdingForNA", 0, n1)(CladdingForNA(n1, n2))
		inside(t, "CoreForNA", n1, most)(CoreForNA(n1, n2))
		inside(t, "CladdingForDelta", 0, most)(CladdingForDelta(n1, delta))
		inside(t, "CladdingForDeltaWeak", 0, most)(CladdingForDeltaWeak(n1, delta))
		inside(t, "CoreForDelta", 0, most)(CoreForDelta(n1, delta))
		inside(t, "CoreForDeltaWeak", 0, most)(CoreForDeltaWeak(n1, delta))
		if na, err := NA(n1, n2); err == nil && na > 1e-300 && na < n1 {
			back, err := CladdingForNA(n1, na)
			// Of n2^2 = n1^2 - NA^2 an error of an ulp or two in NA^2 remains.
			if err != nil || math.Abs(back-n2) > 4e-16*n1*(n1/n2) && n2 > 1e-8*n1 {
				t.Errorf("NA(%v, %v) = %v, and back %v, %v", n1, n2, na, back, err)
			}
		}
	})
}

func FuzzAcceptance(f *testing.F) {
	seed(f)
	f.Fuzz(func(t *testing.T, na, outside, gamma, order, halfAngle float64) {
		inside(t, "AcceptanceAngle", 0, math.Pi/2)(AcceptanceAngle(na, outside))
		inside(t, "SolidAngle", 0, 2*math.Pi)(SolidAngle(na, outside))
		inside(t, "SolidAngleWeak", 0, math.Pi)(SolidAngleWeak(na, outside))
		inside(t, "SkewAcceptanceAngle", 0, math.Pi/2)(SkewAcceptanceAngle(na, outside, gamma))
		inside(t, "CosineShare", 0, 1)(CosineShare(na, order, outside))
		inside(t, "CosineOrder", 0, most)(CosineOrder(halfAngle))
		meridional, err := AcceptanceAngle(na, outside)
		if skew, err2 := SkewAcceptanceAngle(na, outside, gamma); err == nil && err2 == nil && skew < meridional {
			t.Errorf("skew %v below meridional %v", skew, meridional)
		}
	})
}

func FuzzV(f *testing.F) {
	seed(f)
	f.Fuzz(func(t *testing.T, radius, na, wavelength, alpha, group float64) {
		inside(t, "V", 0, most)(V(radius, na, wavelength))
		inside(t, "RadiusForV", 0, most)(RadiusForV(radius, na, wavelength))
		inside(t, "NAForV", 0, most)(NAForV(radius, na, wavelength))
		inside(t, "CutoffWavelength", 0, most)(CutoffWavelength(radius, na, wavelength))
		inside(t, "PowerLawSingleModeV", StepSingleModeV, most)(PowerLawSingleModeV(alpha))
		inside(t, "StepModeCount", 0, most)(StepModeCount(radius))
		inside(t, "PowerLawModeCount", 0, most)(PowerLawModeCount(radius, alpha))
		inside(t, "PowerLawModeGroups", 0, most)(PowerLawModeGroups(radius, alpha))
		inside(t, "PowerLawGroupB", 0, 1)(PowerLawGroupB(group, radius, alpha))
		v, err := V(radius, na, wavelength)
		if err != nil || v < 1e-300 || math.Max(radius, math.Max(na, wavelength)) > 1e308 {
			return // digits lost to denormals, or a rounding away from infinity
		}
		if back, err := RadiusForV(v, na, wavelength); radius > 1e-300 && (err != nil || !(math.Abs(back/radius-1) < 2e-15)) {
			t.Errorf("RadiusForV %v for %v, %v", back, radius, err)
		}
		if back, err := NAForV(v, radius, wavelength); na > 1e-300 && (err != nil || !(math.Abs(back/na-1) < 2e-15)) {
			t.Errorf("NAForV %v for %v, %v", back, na, err)
		}
		if back, err := CutoffWavelength(radius, na, v); wavelength > 1e-300 && (err != nil || !(math.Abs(back/wavelength-1) < 2e-15)) {
			t.Errorf("CutoffWavelength %v for %v, %v", back, wavelength, err)
		}
	})
}

func FuzzCore(f *testing.F) {
	seed(f)
	f.Fuzz(func(t *testing.T, radius, na, alpha, x, y float64) {
		core := Core{radius, na, alpha}
		inside(t, "Core.LocalNA", 0, na)(core.LocalNA(x))
		inside(t, "Core.LambertianShare", 0, 1)(core.LambertianShare(x, y))
		inside(t, "Core.GaussianShare", 0, 1)(core.GaussianShare(x, y))
		inside(t, "GaussianSpatialShare", 0, 1)(GaussianSpatialShare(radius, x))
		inside(t, "GaussianAngularShare", 0, 1)(GaussianAngularShare(na, x, y))
		// No core takes more than the step that it lies within.
		if share, err := core.GaussianShare(x, y); err == nil {
			step, err := Core{radius, na, math.Inf(1)}.GaussianShare(x, y)
			if err != nil || share > step*(1+1e-12)+1e-300 {
				t.Errorf("%v takes %v, the step %v, %v", core, share, step, err)
			}
		}
		if share, err := core.LambertianShare(x, y); err == nil {
			step, err := Core{radius, na, math.Inf(1)}.LambertianShare(x, y)
			if err != nil || share > step*(1+1e-15)+1e-300 {
				t.Errorf("%v takes %v, the step %v, %v", core, share, step, err)
			}
		}
	})
}

func FuzzRay(f *testing.F) {
	seed(f)
	f.Fuzz(func(t *testing.T, na, alpha, r, transverse, gamma float64) {
		core, ray := Core{1, na, alpha}, Ray{r, transverse, gamma}
		kind, err := core.RayKind(ray)
		inside(t, "Core.RayKind", 1, 3)(float64(kind), err)
		_ = kind.String()
		beta, l, err := core.Invariants(ray, 1.444)
		inside(t, "Core.Invariants", 0, most)(beta, err)
		inside(t, "Core.Invariants", 0, most)(l, err)
		if kind == Tunnelling && (gamma == 0 || r == 0) {
			t.Errorf("%v: a meridional ray tunnels: %v", core, ray)
		}
	})
}
