package dispersion

import (
	"errors"
	"math"
	"testing"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/modes"
)

var seeds = []float64{0, math.Copysign(0, -1), 5e-324, 1e-310, 1e-160, 1e-7, 0.05, 1, 1.444, 2.4, 100, 1e160, 1e300, math.MaxFloat64,
	-1, math.NaN(), math.Inf(1), math.Inf(-1)}

// explained fails unless the error names what was refused.
func explained(t *testing.T, err error) {
	t.Helper()
	var refused *domain.Error
	if !errors.As(err, &refused) || refused.Func == "" || refused.Argument == "" || refused.Allowed == "" {
		t.Errorf("error %v", err)
	}
}

func finite(x ...float64) bool {
	for _, y := range x {
		if math.IsNaN(y) || math.IsInf(y, 0) {
			return false
		}
	}
	return true
}

func checkMedium(t *testing.T, m materials.Medium, x, from, to float64) {
	t.Helper()
	r, err := At(m, x)
	if err != nil {
		explained(t, err)
	} else if !finite(r.Wavelength, r.Index, r.GroupIndex, r.D, r.Slope, r.Beta2, r.Beta3, r.Beta4) || r.Index <= 0 {
		t.Errorf("%+v at %v: %+v", m, x, r)
	}
	delay, err := GroupDelay(m, x)
	if err != nil {
		explained(t, err)
	} else if !finite(delay) {
		t.Errorf("%+v at %v: group delay %v", m, x, delay)
	}
	if mode, ok := m.(Separable); ok {
		p, err := Split(mode, x)
		if err != nil {
			explained(t, err)
		} else if !finite(p.D, p.Material, p.Waveguide, p.Profile) || p.D != r.D {
			t.Errorf("%+v at %v: %+v", m, x, p)
		}
	}
	zeros, err := ZeroDispersions(m, from, to)
	if err != nil {
		explained(t, err)
		return
	}
	for i, z := range zeros {
		if !(z >= from && z <= to) || i > 0 && z <= zeros[i-1] {
			t.Errorf("%+v from %v to %v: zeros %v", m, from, to, zeros)
		}
	}
	first, err := ZeroDispersion(m, from, to)
	if (err == nil) != (len(zeros) > 0) || err == nil && first != zeros[0] || err != nil && !errors.Is(err, ErrNoZero) {
		t.Errorf("%+v from %v to %v: %v, %v beside %v", m, from, to, first, err, zeros)
	}
}

func FuzzGlass(f *testing.F) {
	for _, x := range seeds {
		f.Add(x, 0.1e-6, 0.5, 9e-6, 1.3e-6, 1e-6, 2e-6)
		f.Add(1.1, x, 0.9, 9.9e-6, 1.3e-6, 1e-6, 2e-6)
		f.Add(1.1, 0.1e-6, 0.9, x, 1.3e-6, 1e-6, 2e-6)
		f.Add(1.1, 0.1e-6, 0.9, 9.9e-6, x, 1e-6, 2e-6)
		f.Add(1.1, 0.1e-6, 0.9, 9.9e-6, 1.3e-6, x, 2e-6)
		f.Add(1.1, 0.1e-6, 0.9, 9.9e-6, 1.3e-6, 1e-6, x)
		f.Add(x, x, x, x, x, x, 2*x)
	}
	f.Fuzz(func(t *testing.T, a1, l1, a2, l2, x, from, to float64) {
		var glass materials.Sellmeier // no range: any wavelength
		glass.Terms[0] = materials.Term{A: a1, L: l1}
		glass.Terms[1] = materials.Term{A: a2, L: l2}
		checkMedium(t, glass, x, from, to)
		checkMedium(t, materials.FusedSilica(), x, from, to)
		checkMedium(t, materials.Constant(a1), x, from, to)
	})
}

func FuzzMode(f *testing.F) {
	for _, x := range seeds {
		f.Add(x, 1.45, 1.444, 1.3e-6, 1e-6, 2e-6, 0, 1)
		f.Add(4e-6, x, 1.444, 1.3e-6, 1e-6, 2e-6, 0, 1)
		f.Add(4e-6, 1.45, x, 1.3e-6, 1e-6, 2e-6, 1, 1)
		f.Add(4e-6, 1.45, 1.444, x, 1e-6, 2e-6, 0, 1)
		f.Add(4e-6, 1.45, 1.444, 1.3e-6, x, 2e-6, 0, 1)
		f.Add(4e-6, 1.45, 1.444, 1.3e-6, 1e-6, x, -1, 0)
		f.Add(4e-6, 0.05, 0.0, x, 1e-6, 2e-6, 0, 1)
		f.Add(x, x, x/2, x, x, 2*x, 0, 2)
	}
	f.Add(4e-6, 0.05, 0.0, 1.3e-6, 0.4e-6, 4e-6, 0, 1)
	f.Add(10e-6, 0.2, 0.1, 0.6e-6, 0.4e-6, 1e-6, 5, 2)
	f.Fuzz(func(t *testing.T, radius, n1, n2, x, from, to float64, l, m int) {
		step := modes.Step{Radius: radius, Core: materials.Constant(n1), Cladding: materials.Constant(n2)}
		checkMedium(t, step.LP(l, m), x, from, to)
		core, err := materials.GermaniaSilica(n1)
		cladding, err2 := materials.GermaniaSilica(n2)
		if err == nil && err2 == nil {
			checkMedium(t, modes.Step{Radius: radius, Core: core, Cladding: cladding}.LP(l, m), x, from, to)
		}
	})
}
