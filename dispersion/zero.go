package dispersion

import (
	"errors"
	"fmt"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/root"
)

// ErrNoZero says that D has no zero in the range asked for.
var ErrNoZero = errors.New("no zero of dispersion in the range")

// zeroCells is into how many cells ZeroDispersions cuts the range: a pair of zeros
// is found whatever their distance, unless a cell holds a further extremum of D.
const zeroCells = 48

// ZeroDispersion returns the vacuum wavelength (m) between from and to at which D is
// zero: the shortest, where there are several. The medium must answer over the whole
// range; its errors are returned as they are. The error matches ErrNoZero when D has
// no zero. The result is good to a few units in the last place of what the index's
// own second derivative fixes, about 1e-15 relative for a glass, 1e-13 for a mode.
func ZeroDispersion(m materials.Medium, from, to float64) (float64, error) {
	zeros, err := ZeroDispersions(m, from, to)
	if err != nil {
		return 0, err
	}
	if len(zeros) == 0 {
		return 0, fmt.Errorf("dispersion.ZeroDispersion: from %v m to %v m: %w", from, to, ErrNoZero)
	}
	return zeros[0], nil
}

// ZeroDispersions returns every vacuum wavelength (m) between from and to at which D is
// zero, in rising order; none is an empty list and no error. Dispersion-flattened
// fibres have two or three. A medium with no dispersion at all, such as
// materials.Constant, has no zero to name.
func ZeroDispersions(m materials.Medium, from, to float64) ([]float64, error) {
	const function = "dispersion.ZeroDispersions"
	if err := domain.Positive(function, "from", from, "m"); err != nil {
		return nil, err
	}
	if err := domain.Positive(function, "to", to, "m"); err != nil {
		return nil, err
	}
	if !(to > from) {
		return nil, &domain.Error{Func: function, Argument: "to", Value: to,
			Allowed: fmt.Sprintf("above from = %v (m)", from)}
	}
	disperses := false
	zeros, err := root.All(func(x float64) (float64, float64, error) {
		r, err := At(m, x)
		disperses = disperses || r.D != 0
		return r.D, r.Slope, err
	}, from, to, zeroCells)
	if !disperses {
		return nil, err
	}
	return zeros, err
}
