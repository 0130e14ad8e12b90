package main

import (
	"errors"
	"fmt"

	"glassthread/dispersion"
	"glassthread/materials"
	"glassthread/modes"
	"glassthread/numap"
	"glassthread/snell"
)

// report is everything on the sheet, in SI units.
type report struct {
	Recipe     recipe       `json:"recipe"`
	Cutoffs    []cutoff     `json:"cutoff_wavelengths"`
	Zeros      []float64    `json:"zero_dispersion_wavelengths_m"`
	ZeroRange  span         `json:"zero_dispersion_searched_m"`
	At         []wavelength `json:"at"`
	Wavelength span         `json:"glass_range_m"`
}

type span struct {
	From float64 `json:"from"`
	To   float64 `json:"to"`
}

// cutoff is the wavelength above which a mode is no longer guided.
type cutoff struct {
	Mode       string  `json:"mode"`
	V          float64 `json:"cutoff_v"`
	Wavelength float64 `json:"wavelength_m,omitempty"`
	Note       string  `json:"note,omitempty"`
}

// wavelength is what holds at one wavelength.
type wavelength struct {
	Wavelength      float64 `json:"wavelength_m"`
	Core            float64 `json:"core_index"`
	Cladding        float64 `json:"cladding_index"`
	Delta           float64 `json:"relative_index_difference"`
	NA              float64 `json:"numerical_aperture"`
	AcceptanceAngle float64 `json:"acceptance_angle_rad"`
	CriticalAngle   float64 `json:"critical_angle_rad"`
	V               float64 `json:"v"`
	Modes           []mode  `json:"modes"`
}

// mode is one guided mode at one wavelength.
type mode struct {
	Mode       string  `json:"mode"`
	Degeneracy int     `json:"degeneracy"`
	B          float64 `json:"b"`
	Index      float64 `json:"effective_index"`
	Group      float64 `json:"group_index"`
	Delay      float64 `json:"group_delay_s_per_m"`
	D          float64 `json:"d_s_per_m2"`
	Material   float64 `json:"d_material_s_per_m2"`
	Waveguide  float64 `json:"d_waveguide_s_per_m2"`
	Profile    float64 `json:"d_profile_s_per_m2"`
	Slope      float64 `json:"slope_s_per_m3"`
	Beta2      float64 `json:"beta2_s2_per_m"`
	CorePower  float64 `json:"core_power_share"`
}

func (r recipe) report() (*report, error) {
	fibre, glasses, err := r.fibre()
	if err != nil {
		return nil, err
	}
	if len(r.Wavelengths) == 0 {
		return nil, errors.New("wavelengths: at least one is needed")
	}
	out := &report{Recipe: r, Wavelength: span{glasses.From, glasses.To}}
	for _, nm := range r.Wavelengths {
		if err := positive("wavelength (nm)", nm); err != nil {
			return nil, err
		}
		w, err := at(fibre, nm/1e9)
		if err != nil {
			return nil, fmt.Errorf("at %v nm: %w", nm, err)
		}
		out.At = append(out.At, *w)
	}
	if out.Cutoffs, err = cutoffs(fibre, glasses, out.At); err != nil {
		return nil, err
	}
	out.ZeroRange = span{max(glasses.From, 0.8e-6), min(glasses.To, 2e-6)}
	if out.ZeroRange.To > out.ZeroRange.From {
		// A core that stops guiding in the range is no error of the sheet's.
		out.Zeros, err = dispersion.ZeroDispersions(fibre.LP(0, 1), out.ZeroRange.From, out.ZeroRange.To)
		if err != nil && !errors.Is(err, numap.ErrNotGuiding) {
			return nil, err
		}
	}
	return out, nil
}

func at(fibre modes.Step, x float64) (*wavelength, error) {
	n1, err := materials.Index(fibre.Core, x)
	if err != nil {
		return nil, fmt.Errorf("core: %w", err)
	}
	n2, err := materials.Index(fibre.Cladding, x)
	if err != nil {
		return nil, fmt.Errorf("cladding: %w", err)
	}
	w := &wavelength{Wavelength: x, Core: n1, Cladding: n2}
	if w.NA, err = numap.NA(n1, n2); err != nil {
		return nil, err
	}
	if w.Delta, err = numap.Delta(n1, n2); err != nil {
		return nil, err
	}
	if w.AcceptanceAngle, err = numap.AcceptanceAngle(w.NA, 1); err != nil {
		return nil, err
	}
	if w.CriticalAngle, err = snell.CriticalAngle(n1, n2); err != nil {
		return nil, err
	}
	if w.V, err = numap.V(fibre.Radius, w.NA, x); err != nil {
		return nil, err
	}
	guided, err := fibre.Guided(x)
	if err != nil {
		return nil, err
	}
	for _, g := range guided {
		c, err := dispersion.At(g.Mode, x)
		if err != nil {
			return nil, err
		}
		parts, err := dispersion.Split(g.Mode, x)
		if err != nil {
			return nil, err
		}
		w.Modes = append(w.Modes, mode{
			Mode: g.Mode.String(), Degeneracy: g.Degeneracy, B: g.Solution.B,
			Index: c.Index, Group: c.GroupIndex, Delay: c.GroupIndex / materials.SpeedOfLight,
			D: c.D, Material: parts.Material, Waveguide: parts.Waveguide, Profile: parts.Profile,
			Slope: c.Slope, Beta2: c.Beta2, CorePower: g.Solution.CorePower(),
		})
	}
	return w, nil
}

// cutoffs returns the cut-off wavelengths of the modes that come after LP01 in the order
// of their cut-off: of every mode guided at one of the wavelengths and of the next two, but
// of no more than ten.
func cutoffs(fibre modes.Step, glasses materials.Range, at []wavelength) ([]cutoff, error) {
	most := 0.0
	for _, w := range at {
		most = max(most, w.V)
	}
	candidates, err := modes.GuidedLP(min(most+4, 20))
	if err != nil {
		return nil, err
	}
	var list []cutoff
	var labels []modes.StepLP
	for _, p := range candidates {
		if p.L == 0 && p.M == 1 {
			continue
		}
		v, err := modes.CutoffV(p.L, p.M)
		if err != nil {
			return nil, err
		}
		i := len(list) // keep the list in the order of V
		for i > 0 && list[i-1].V > v {
			i--
		}
		m := fibre.LP(p.L, p.M)
		list = append(list[:i], append([]cutoff{{Mode: m.String(), V: v}}, list[i:]...)...)
		labels = append(labels[:i], append([]modes.StepLP{m}, labels[i:]...)...)
	}
	keep := 0
	for keep < len(list) && keep < 10 && (list[keep].V < most || keep < 2 || list[keep-2].V < most) {
		keep++
	}
	list = list[:keep]
	for i := range list {
		x, err := labels[i].CutoffWavelength(glasses.From, glasses.To)
		switch {
		case err == nil:
			list[i].Wavelength = x
		case errors.Is(err, modes.ErrNoCutoff):
			list[i].Note = "outside the range of the glass data"
		default:
			return nil, err
		}
	}
	return list, nil
}
