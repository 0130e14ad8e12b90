package numap

import (
	"math"

	"glassthread/materials/domain"
)

// SkewAcceptanceAngle returns the half-angle (rad) with the axis, in an outer medium
// of index n0 = outside > 0, up to which a step core of the given NA, at least 0,
// reflects skew rays totally: asin(NA/(n0 cos gamma)) (Senior, eq. 2.17). The angle
// gamma, from 0 to pi/2, is that between the projection of the ray on the
// cross-section and the radius where it meets the wall; the two chords of the
// projection that meet there enclose 2 gamma. For gamma = 0 it is AcceptanceAngle.
// Where NA is at or above n0 cos gamma all angles are taken, pi/2. The rays beyond
// AcceptanceAngle tunnel: the core holds them for a while and loses them (see
// Core.RayKind).
func SkewAcceptanceAngle(na, outside, gamma float64) (float64, error) {
	const name = "numap.SkewAcceptanceAngle"
	if err := aperture(name, na, outside); err != nil {
		return 0, err
	}
	if err := domain.Within(name, "gamma", gamma, 0, math.Pi/2, "rad"); err != nil {
		return 0, err
	}
	reach := outside * math.Cos(gamma)
	if na >= reach {
		return math.Pi / 2, nil
	}
	return math.Atan2(na, leg(reach, na)), nil
}

// Ray is a ray in a core, told by where and how it crosses a plane across the axis,
// such as the end face. The zero Ray runs along the axis.
type Ray struct {
	// R is the distance from the axis (m), from 0 to the core's radius.
	R float64
	// Transverse is n sin(theta), at least 0: the index of a medium times the sine
	// of the angle with the axis in it. A flat end face leaves it as it is (Snell's
	// law), so it may be taken on either side: n0 sin(theta0) outside.
	Transverse float64
	// Gamma is the skewness (rad), from 0 to pi/2: the angle between the ray's
	// projection on the plane and the radius. 0 is a meridional ray, which crosses
	// the axis; pi/2 runs square to the radius.
	Gamma float64
}

// RayKind says what becomes of a ray.
type RayKind int

const (
	// Bound rays are guided without loss in the ray picture: n2 < beta.
	Bound RayKind = iota + 1
	// Tunnelling rays turn back within the core but leak beyond an outer caustic:
	// beta <= n2 and beta^2 + l^2 > n2^2. Skew rays only.
	Tunnelling
	// Refracting rays leave the core where they first meet its wall:
	// beta^2 + l^2 <= n2^2.
	Refracting
)

// String returns "bound", "tunnelling" or "refracting".
func (k RayKind) String() string {
	switch k {
	case Bound:
		return "bound"
	case Tunnelling:
		return "tunnelling"
	case Refracting:
		return "refracting"
	}
	return "no kind of ray"
}

// RayKind tells bound, tunnelling (also called leaky) and refracting rays apart
// (Snyder and Love 1983, chapter 2, in terms of the ray invariants beta and
// l). A ray exactly at the local acceptance angle counts as bound. The comparison
// is made on transverse components, so a small index difference costs no accuracy.
func (c Core) RayKind(ray Ray) (RayKind, error) {
	const name = "numap.Core.RayKind"
	if err := c.checkRay(name, ray); err != nil {
		return 0, err
	}
	// beta^2 = n(r)^2 - T^2 and l = (r/a) T sin(gamma), with n(r)^2 = n2^2 + NA(r)^2.
	na := c.localNA(ray.R)
	if ray.Transverse <= na {
		return Bound, nil
	}
	// 1 - (r/a)^2 sin^2 = cos^2 + (1 - (r/a)^2) sin^2, both terms at least 0.
	sin, cos := math.Sincos(ray.Gamma)
	if ray.Transverse*math.Hypot(cos, leg(c.Radius, ray.R)/c.Radius*sin) < na {
		return Tunnelling, nil
	}
	return Refracting, nil
}

// Invariants returns the two numbers that a ray keeps all along a core in a cladding
// of index n2 > 0: beta = n(r) cos(theta) and l = (r/a) n(r) sin(theta) sin(gamma),
// theta in the core (Snyder and Love 1983, chapter 2, whose azimuthal angle is
// pi/2 - gamma). A Transverse above n(r) belongs to no ray and gives an error.
func (c Core) Invariants(ray Ray, cladding float64) (beta, l float64, err error) {
	const name = "numap.Core.Invariants"
	if err := c.checkRay(name, ray); err != nil {
		return 0, 0, err
	}
	if err := domain.Positive(name, "cladding", cladding, ""); err != nil {
		return 0, 0, err
	}
	index := math.Hypot(cladding, c.localNA(ray.R))
	if err := domain.Result(name, "index", index); err != nil {
		return 0, 0, err
	}
	if ray.Transverse > index {
		return 0, 0, &domain.Error{Func: name, Argument: "Ray.Transverse", Value: ray.Transverse,
			Allowed: "at most the index at Ray.R"}
	}
	return leg(index, ray.Transverse), ray.R / c.Radius * ray.Transverse * math.Sin(ray.Gamma), nil
}

func (c Core) checkRay(name string, ray Ray) error {
	if err := c.check(name); err != nil {
		return err
	}
	if err := domain.NonNegative(name, "Ray.R", ray.R, "m"); err != nil {
		return err
	}
	if ray.R > c.Radius {
		return &domain.Error{Func: name, Argument: "Ray.R", Value: ray.R, Allowed: "at most the core's radius (m)"}
	}
	if err := domain.NonNegative(name, "Ray.Transverse", ray.Transverse, ""); err != nil {
		return err
	}
	return domain.Within(name, "Ray.Gamma", ray.Gamma, 0, math.Pi/2, "rad")
}
