package main

import (
	"encoding/csv"
	"encoding/json"
	"io"
	"strconv"
)

func writeJSON(out io.Writer, r *report) error {
	e := json.NewEncoder(out)
	e.SetIndent("", "  ")
	return e.Encode(r)
}

// writeCSV writes a row for each guided mode at each wavelength. Cut-offs, zeros and
// notes have no place in it.
func writeCSV(out io.Writer, r *report) error {
	w := csv.NewWriter(out)
	if err := w.Write([]string{"wavelength_m", "core_index", "cladding_index", "delta", "na",
		"acceptance_angle_rad", "critical_angle_rad", "v", "mode", "degeneracy", "b",
		"effective_index", "group_index", "group_delay_s_per_m", "d_s_per_m2", "d_material_s_per_m2",
		"d_waveguide_s_per_m2", "d_profile_s_per_m2", "slope_s_per_m3", "beta2_s2_per_m", "core_power_share"}); err != nil {
		return err
	}
	for _, a := range r.At {
		for _, m := range a.Modes {
			var row []string
			for _, x := range []float64{a.Wavelength, a.Core, a.Cladding, a.Delta, a.NA, a.AcceptanceAngle, a.CriticalAngle, a.V} {
				row = append(row, number(x))
			}
			row = append(row, m.Mode, strconv.Itoa(m.Degeneracy))
			for _, x := range []float64{m.B, m.Index, m.Group, m.Delay, m.D, m.Material, m.Waveguide, m.Profile, m.Slope, m.Beta2, m.CorePower} {
				row = append(row, number(x))
			}
			if err := w.Write(row); err != nil {
				return err
			}
		}
	}
	w.Flush()
	return w.Error()
}

// number writes a float64 in full.
func number(x float64) string { return strconv.FormatFloat(x, 'g', -1, 64) }
