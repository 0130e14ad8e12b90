package numap

import (
	"math"

	"glassthread/materials/domain"
)

// StepModeCount returns about how many modes a step-index core of the given V > 0
// guides, both polarisations and both orientations counted: V^2/2 (Gloge 1971;
// Senior, eq. 2.74). It is the leading term for large V. The exact count by the zeros
// of the Bessel functions lies above it by about 0.27 V on average; the difference is
// under 6 % from V = 20 on. The smaller 4 V^2/pi^2 that is also met counts the modes of low
// azimuthal order only, as if they were spaced alike, and misses a fifth.
func StepModeCount(v float64) (float64, error) {
	return modeCount("numap.StepModeCount", v, math.Inf(1))
}

// PowerLawModeCount returns about how many modes a core of the given V > 0 and the
// profile n^2 = n1^2 - NA^2 (r/a)^alpha guides, both polarisations and orientations
// counted: [alpha/(alpha + 2)] V^2/2, for alpha above 0; alpha = +Inf is the step
// (D. Gloge and E. A. J. Marcatili, Bell Syst. Tech. J. 52, 1563 (1973)). It is the
// leading term for large V.
func PowerLawModeCount(v, alpha float64) (float64, error) {
	return modeCount("numap.PowerLawModeCount", v, alpha)
}

func modeCount(name string, v, alpha float64) (float64, error) {
	if err := domain.Positive(name, "v", v, ""); err != nil {
		return 0, err
	}
	if err := profile(name, alpha); err != nil {
		return 0, err
	}
	count := v * (v / (2 * (1 + 2/alpha)))
	return count, domain.Result(name, "mode count", count)
}

// PowerLawModeGroups returns about how many groups of modes with nearly the same
// effective index a power-law core guides: the square root of its mode count,
// V sqrt(alpha/(2 (alpha + 2))), for V and alpha above 0 (Gloge and Marcatili 1973).
// The g-th group holds 2 g modes. A parabola has V/2 groups. For alpha = +Inf, the
// step, the number is formal: its modes do not fall into groups.
func PowerLawModeGroups(v, alpha float64) (float64, error) {
	return modeGroups("numap.PowerLawModeGroups", v, alpha)
}

func modeGroups(name string, v, alpha float64) (float64, error) {
	if err := domain.Positive(name, "v", v, ""); err != nil {
		return 0, err
	}
	if err := profile(name, alpha); err != nil {
		return 0, err
	}
	return v * math.Sqrt(0.5/(1+2/alpha)), nil
}

// PowerLawGroupB returns the normalised propagation constant
// b = (n_eff^2 - n2^2)/(n1^2 - n2^2) of the g-th group of modes of a power-law core,
// 1 - (g/G)^(2 alpha/(alpha + 2)) with G of PowerLawModeGroups, for V and alpha above
// 0 and g from 0 to G (Gloge and Marcatili 1973). It is asymptotic for large V, where
// g may stand for 2 m + l - 1; for the parabola that agrees with the exact modes of
// an unbounded one, b = 1 - 2 g/V. A g beyond G gives an error that matches
// ErrNotGuiding.
func PowerLawGroupB(group, v, alpha float64) (float64, error) {
	const name = "numap.PowerLawGroupB"
	if err := domain.NonNegative(name, "group", group, ""); err != nil {
		return 0, err
	}
	groups, err := modeGroups(name, v, alpha)
	if err != nil {
		return 0, err
	}
	if group > groups {
		return 0, &domain.Error{Func: name, Argument: "group", Value: group,
			Allowed: "at most the number of groups, PowerLawModeGroups", Kind: ErrNotGuiding}
	}
	if group == 0 {
		return 1, nil // also where groups rounds to 0
	}
	return -math.Expm1(2 / (1 + 2/alpha) * lnRatio(group, groups)), nil
}
