package numap

import (
	"math"

	"glassthread/materials/domain"
)

// Delta returns the exact relative index difference (n1^2 - n2^2)/(2 n1^2) of a
// core of index n1 in a cladding of index n2, both above 0 (Gloge 1971; Snyder and
// Love 1983, chapter 2). With it NA = n1 sqrt(2 Delta) holds exactly. It lies below
// 1/2, and below 0 for a depressed region such as a trench, which is no error.
func Delta(core, cladding float64) (float64, error) {
	const name = "numap.Delta"
	if err := indices(name, core, cladding); err != nil {
		return 0, err
	}
	delta := (core - cladding) / core * (0.5 + 0.5*(cladding/core))
	return delta, domain.Result(name, "Delta", delta)
}

// DeltaWeak returns the weak-guidance relative index difference (n1 - n2)/n1 of a
// core of index n1 in a cladding of index n2, both above 0 (Senior, eq. 2.9). It
// exceeds Delta by half its square. It is below 0 for a depressed region.
func DeltaWeak(core, cladding float64) (float64, error) {
	const name = "numap.DeltaWeak"
	if err := indices(name, core, cladding); err != nil {
		return 0, err
	}
	delta := (core - cladding) / core
	return delta, domain.Result(name, "Delta", delta)
}

// NAWeak returns n1 sqrt(2 delta) for a core of index n1 > 0 and a relative index
// difference above 0 and below 1/2 (Senior, eq. 2.10). With a delta from DeltaWeak,
// as data sheets mostly mean it, this is the weak-guidance form, too large by about
// delta/4 of its value; with one from Delta it is the exact NA. A delta of 0 or less
// gives an error that matches ErrNotGuiding.
func NAWeak(core, delta float64) (float64, error) {
	const name = "numap.NAWeak"
	if err := domain.Positive(name, "core", core, ""); err != nil {
		return 0, err
	}
	if delta <= 0 {
		return 0, &domain.Error{Func: name, Argument: "delta", Value: delta,
			Allowed: "above 0 and below 0.5", Kind: ErrNotGuiding}
	}
	if !(delta < 0.5) {
		return 0, &domain.Error{Func: name, Argument: "delta", Value: delta, Allowed: "above 0 and below 0.5"}
	}
	return core * math.Sqrt(2*delta), nil
}

// CladdingForNA returns the cladding index sqrt(n1^2 - NA^2) that gives a core of
// index n1 the wanted NA, above 0 and below n1. It inverts NA.
func CladdingForNA(core, na float64) (float64, error) {
	const name = "numap.CladdingForNA"
	if err := domain.Positive(name, "core", core, ""); err != nil {
		return 0, err
	}
	if err := domain.Positive(name, "na", na, ""); err != nil {
		return 0, err
	}
	if !(na < core) {
		return 0, &domain.Error{Func: name, Argument: "na", Value: na, Allowed: "below the index of the core"}
	}
	return leg(core, na), nil
}

// CoreForNA returns the core index sqrt(n2^2 + NA^2) that has the wanted NA, above
// 0, in a cladding of index n2 > 0. It inverts NA.
func CoreForNA(cladding, na float64) (float64, error) {
	const name = "numap.CoreForNA"
	if err := domain.Positive(name, "cladding", cladding, ""); err != nil {
		return 0, err
	}
	if err := domain.Positive(name, "na", na, ""); err != nil {
		return 0, err
	}
	core := math.Hypot(cladding, na)
	return core, domain.Result(name, "core index", core)
}

// CladdingForDelta returns the cladding index n1 sqrt(1 - 2 delta) at which a core of
// index n1 > 0 has the exact relative index difference delta, finite and below 1/2.
// It inverts Delta; a delta of 0 or less gives a cladding at or above the core.
func CladdingForDelta(core, delta float64) (float64, error) {
	const name = "numap.CladdingForDelta"
	if err := indexAndDelta(name, "core", core, delta, 0.5); err != nil {
		return 0, err
	}
	cladding := core * math.Sqrt(1-2*delta)
	return cladding, domain.Result(name, "cladding index", cladding)
}

// CladdingForDeltaWeak returns the cladding index n1 (1 - delta) at which a core of
// index n1 > 0 has the weak-guidance relative index difference delta, finite and
// below 1. It inverts DeltaWeak.
func CladdingForDeltaWeak(core, delta float64) (float64, error) {
	const name = "numap.CladdingForDeltaWeak"
	if err := indexAndDelta(name, "core", core, delta, 1); err != nil {
		return 0, err
	}
	cladding := core * (1 - delta)
	return cladding, domain.Result(name, "cladding index", cladding)
}

// CoreForDelta returns the core index n2 / sqrt(1 - 2 delta) that has the exact
// relative index difference delta, finite and below 1/2, in a cladding of index
// n2 > 0. It inverts Delta.
func CoreForDelta(cladding, delta float64) (float64, error) {
	const name = "numap.CoreForDelta"
	if err := indexAndDelta(name, "cladding", cladding, delta, 0.5); err != nil {
		return 0, err
	}
	core := cladding / math.Sqrt(1-2*delta)
	return core, domain.Result(name, "core index", core)
}

// CoreForDeltaWeak returns the core index n2 / (1 - delta) that has the
// weak-guidance relative index difference delta, finite and below 1, in a cladding
// of index n2 > 0. It inverts DeltaWeak.
func CoreForDeltaWeak(cladding, delta float64) (float64, error) {
	const name = "numap.CoreForDeltaWeak"
	if err := indexAndDelta(name, "cladding", cladding, delta, 1); err != nil {
		return 0, err
	}
	core := cladding / (1 - delta)
	return core, domain.Result(name, "core index", core)
}

func indexAndDelta(function, argument string, index, delta, limit float64) error {
	if err := domain.Positive(function, argument, index, ""); err != nil {
		return err
	}
	if delta < limit && delta >= -math.MaxFloat64 {
		return nil
	}
	allowed := "finite and below 1"
	if limit == 0.5 {
		allowed = "finite and below 0.5"
	}
	return &domain.Error{Func: function, Argument: "delta", Value: delta, Allowed: allowed}
}
