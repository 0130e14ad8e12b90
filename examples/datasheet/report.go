package main

import (
	"errors"
	"fmt"

	"glassthread/dispersion"
	"glassthread/materials"
	"glassthread/materials/root"
	"glassthread/modes"
	"glassthread/numap"
	"glassthread/snell"
)

// report is everything on the sheet, in SI units.
type report struct {
	Recipe     recipe       `json:"recipe"`
	Cutoffs    []cutoff     `json:"cutoff_wavelengths"`
	Zeros      []float64    `json:"zero_dispersion_wavelengths_m"`
	Searched   []span       `json:"zero_dispersion_searched_m"` // where the core guides
	At         []wavelength `json:"at"`
	Wavelength span         `json:"glass_range_m"`
	Notes      []string     `json:"notes"`
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
	fibre, err := r.fibre()
	if err != nil {
		return nil, err
	}
	if len(r.Wavelengths) == 0 {
		return nil, errors.New("wavelengths: at least one is needed")
	}
	glasses := fibre.glasses
	out := &report{Recipe: r, Wavelength: span{glasses.From, glasses.To}, Zeros: []float64{}, Searched: []span{}, Notes: fibre.notes}
	for _, nm := range r.Wavelengths {
		if err := positive("wavelength (nm)", nm); err != nil {
			return nil, err
		}
		if !glasses.Contains(nm / 1e9) {
			return nil, fmt.Errorf("wavelength = %v nm: the data of %s and %s hold from %.6g to %.6g nm together", nm,
				r.Core.Glass, r.Cladding.Glass, glasses.From*1e9, glasses.To*1e9)
		}
		w, err := at(fibre.Step, nm/1e9)
		if errors.Is(err, numap.ErrNotGuiding) {
			return nil, fmt.Errorf("at %v nm the core (%v) guides no light: its index %.6f is not above the %.6f of the cladding (%v); "+
				"change a glass or a fraction", nm, r.Core, w.Core, w.Cladding, r.Cladding)
		}
		if err != nil {
			return nil, fmt.Errorf("at %v nm: %w", nm, err)
		}
		out.At = append(out.At, *w)
	}
	if out.Cutoffs, err = cutoffs(fibre.Step, glasses, out.At); err != nil {
		return nil, err
	}
	// Below zeroFrom many modes are guided and no one asks for LP01's own zero.
	if from := max(glasses.From, zeroFrom); from < glasses.To {
		if out.Searched, err = guiding(fibre.Step, from, glasses.To); err != nil {
			return nil, err
		}
	}
	for _, s := range out.Searched {
		zeros, err := dispersion.ZeroDispersions(fibre.LP(0, 1), s.From, s.To)
		if err != nil {
			return nil, err
		}
		out.Zeros = append(out.Zeros, zeros...)
	}
	out.warn()
	return out, nil
}

// zeroFrom is the wavelength from which zeros of dispersion are searched (m).
const zeroFrom = 0.8e-6

const (
	// weakGuidance is the relative index difference above which the sheet warns of the
	// approximation (common practice, no source).
	weakGuidance = 0.02
	// barely is the share of power in the core below which it warns that the mode is
	// guided in theory only.
	barely = 0.01
)

// warn adds the notes that follow from the figures.
func (r *report) warn() {
	for i := range r.At {
		a := &r.At[i]
		if a.Delta > weakGuidance {
			r.note("At %.7g nm the relative index difference is %.1f %%. LP modes are those of weak guidance; the effective "+
				"indices of the true modes differ by a share of that order.", a.Wavelength*1e9, a.Delta*100)
		}
		if share := a.Modes[0].CorePower; share < barely {
			percent := fmt.Sprintf("%.2g %%", share*100)
			if share < 1e-4 {
				percent = "less than 0.01 %"
			}
			r.note("At %.7g nm V is %.3g and %s of LP01's power travels in the core: the mode is barely guided, wide "+
				"beyond any real cladding, and ends at a slight bend.", a.Wavelength*1e9, a.V, percent)
		}
	}
}

func (r *report) note(form string, figures ...any) {
	r.Notes = append(r.Notes, fmt.Sprintf(form, figures...))
}

// guiding returns the parts of a range of wavelengths (m) in which the core's index is
// above the cladding's, without the last 1e-6 before they meet.
func guiding(fibre modes.Step, from, to float64) ([]span, error) {
	contrast := func(x float64) (value, slope float64, err error) {
		n1, err := fibre.Core.Taylor(x)
		if err != nil {
			return 0, 0, err
		}
		n2, err := fibre.Cladding.Taylor(x)
		return n1[0] - n2[0], n1[1] - n2[1], err
	}
	meet, err := root.All(contrast, from, to, 64)
	if err != nil {
		return nil, err
	}
	parts := []span{}
	edges := append(append([]float64{from}, meet...), to)
	for i := range edges[1:] {
		s := span{edges[i], edges[i+1]}
		if i > 0 {
			s.From *= 1 + 1e-6
		}
		if i < len(meet) {
			s.To *= 1 - 1e-6
		}
		middle, _, err := contrast((s.From + s.To) / 2)
		if err != nil {
			return nil, err
		}
		if s.From < s.To && middle > 0 {
			parts = append(parts, s)
		}
	}
	return parts, nil
}

// at returns what holds at the wavelength x (m). With an error of the aperture's it has
// the indices.
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
		return w, err
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
	list := []cutoff{}
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
