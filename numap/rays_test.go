package numap

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/integrate/quad"
)

// gauss integrates f from a to b by the Gauss-Legendre rule of 20 points on each of
// many equal pieces.
func gauss(f func(float64) float64, a, b float64, pieces int) float64 {
	sum := 0.0
	h := (b - a) / float64(pieces)
	for k := range pieces {
		sum += quad.Fixed(f, a+h*float64(k), a+h*float64(k+1), 20, quad.Legendre{}, 1)
	}
	return sum
}

// The shares once more by integration in Go, over the disc and over the cone, against
// the closed forms and the double-exponential rule.
func TestSharesByIntegration(t *testing.T) {
	ok := must(t)
	for _, alpha := range []float64{1, 1.94, 2, 4, 30, inf} {
		for _, outside := range []float64{1, 1.333} {
			core := Core{25e-6, 0.275, alpha}
			for _, source := range []float64{5e-6, 20e-6, 25e-6} {
				want := gauss(func(r float64) float64 {
					edge := ok(AcceptanceAngle(ok(core.LocalNA(r)), outside))
					// Lambert: intensity cos, solid angle 2 pi sin, total pi.
					cone := gauss(func(a float64) float64 { return 2 * math.Cos(a) * math.Sin(a) }, 0, edge, 1)
					return cone * 2 * r / (source * source)
				}, 0, source, 20)
				assert.InEpsilon(t, want, ok(core.LambertianShare(source, outside)), 1e-10)
			}
		}
		core := Core{25e-6, 0.2, alpha}
		for _, waist := range []float64{2e-6, 18e-6, 60e-6} {
			const wavelength = 0.85e-6
			// Where the local NA sinks to 0 the integrand has a thin layer: 1 - r/a = z^6.
			want := gauss(func(z float64) float64 {
				r := core.Radius * (1 - math.Pow(z, 6))
				dr := core.Radius * 6 * math.Pow(z, 5)
				q := math.Pi * waist * ok(core.LocalNA(r)) / wavelength
				return dr * 4 * r / (waist * waist) * math.Exp(-2*r*r/(waist*waist)) * -math.Expm1(-2*q*q)
			}, 0, 1, 200)
			assert.InEpsilon(t, want, ok(core.GaussianShare(waist, wavelength)), 1e-9, "alpha %v, waist %v", alpha, waist)
		}
	}
	for _, order := range []float64{0, 1, 2.5, 40} {
		edge := ok(AcceptanceAngle(0.4, 1))
		want := (order + 1) * gauss(func(a float64) float64 { return math.Pow(math.Cos(a), order) * math.Sin(a) }, 0, edge, 4)
		assert.InEpsilon(t, want, ok(CosineShare(0.4, order, 1)), 1e-13)
	}
	assert.InEpsilon(t, ok(Core{1, 0.4, inf}.LambertianShare(0, 1)), ok(CosineShare(0.4, 1, 1)), 1e-15)
}

// A count of rays over place, direction and skewness: the share of bound rays is the
// LambertianShare, and that of all trapped rays of a step, tunnelling ones included,
// is larger. The share of trapped rays from r follows from the SkewAcceptanceAngle.
func TestRayCount(t *testing.T) {
	const n = 60
	for _, core := range []Core{{25e-6, 0.5, 2}, {25e-6, 0.5, inf}, {25e-6, 1.2, 3}} {
		bound, trapped := 0.0, 0.0
		for i := range n {
			r := core.Radius * math.Sqrt((float64(i)+0.5)/n)
			for j := range n {
				transverse := math.Sqrt((float64(j) + 0.5) / n) // Lambert: even in sin^2
				for k := range n {
					gamma := math.Pi / 2 * (float64(k) + 0.5) / n
					kind, err := core.RayKind(Ray{r, transverse, gamma})
					require.NoError(t, err)
					if kind == Bound {
						bound++
					}
					if kind != Refracting {
						trapped++
					}
				}
			}
		}
		share := must(t)(core.LambertianShare(core.Radius, 1))
		assert.InDelta(t, share, bound/(n*n*n), 0.005)
		if !core.step() {
			continue
		}
		want := gauss(func(x float64) float64 { // x = (r/a)^2
			return gauss(func(gamma float64) float64 {
				wall := math.Asin(math.Sqrt(x) * math.Sin(gamma)) // the chord meets the wall
				edge := must(t)(SkewAcceptanceAngle(core.NA, 1, wall))
				return math.Pow(math.Sin(edge), 2) * 2 / math.Pi
			}, 0, math.Pi/2, 4)
		}, 0, 1, 4)
		assert.InDelta(t, want, trapped/(n*n*n), 0.005)
		assert.Greater(t, trapped, 1.2*bound)
	}
}

// The kinds of ray by their definition through the invariants (Snyder and Love 1983,
// chapter 2), where these are far enough apart for float64.
func TestRayKindByInvariants(t *testing.T) {
	const cladding = 1.444
	seen := map[RayKind]int{}
	for _, alpha := range []float64{1, 2, inf} {
		core := Core{1, 0.3, alpha}
		for r := 0.05; r < 1; r += 0.1 {
			for transverse := 0.01; transverse < 1; transverse += 0.03 {
				for gamma := 0.0; gamma < math.Pi/2; gamma += 0.11 {
					ray := Ray{r, transverse, gamma}
					kind, err := core.RayKind(ray)
					require.NoError(t, err)
					beta, l, err := core.Invariants(ray, cladding)
					require.NoError(t, err)
					want := Refracting
					switch {
					case beta > cladding:
						want = Bound
					case beta*beta+l*l > cladding*cladding:
						want = Tunnelling
					}
					require.Equal(t, want, kind, "%v %v", core, ray)
					seen[kind]++
				}
			}
		}
	}
	assert.Len(t, seen, 3)
}

// The invariants do not change along a ray whose path is known: in a parabola the
// projection is an ellipse about the axis, a harmonic motion in both directions (Snyder
// and Love 1983, chapter 2).
func TestInvariantsAlongAnEllipse(t *testing.T) {
	// A circular one stays at r with T = n sin(theta) = NA r/a, for then n dn/dr balances T^2/r.
	core := Core{25e-6, 0.2, 2}
	for _, r := range []float64{5e-6, 15e-6} {
		transverse := core.NA * r / core.Radius
		_, l, err := core.Invariants(Ray{r, transverse, math.Pi / 2}, 1.444)
		require.NoError(t, err)
		assert.InEpsilon(t, core.NA*(r/core.Radius)*(r/core.Radius), l, 1e-15)
	}
	// An ellipse with half-axes p and q: at their ends T = NA q/a and NA p/a. Both ends
	// must give the same beta and l.
	p, q := 20e-6, 8e-6
	beta1, l1, err := core.Invariants(Ray{p, core.NA * q / core.Radius, math.Pi / 2}, 1.444)
	require.NoError(t, err)
	beta2, l2, err := core.Invariants(Ray{q, core.NA * p / core.Radius, math.Pi / 2}, 1.444)
	require.NoError(t, err)
	assert.InEpsilon(t, beta1, beta2, 3e-16)
	assert.InEpsilon(t, l1, l2, 3e-16)
	// And anywhere between: x = p cos(s), y = q sin(s).
	for s := 0.1; s < 1.5; s += 0.1 {
		x, y := p*math.Cos(s), q*math.Sin(s)
		vx, vy := -p*math.Sin(s), q*math.Cos(s)
		r, v := math.Hypot(x, y), math.Hypot(vx, vy)
		gamma := math.Acos(math.Min(1, math.Abs(x*vx+y*vy)/(r*v)))
		beta, l, err := core.Invariants(Ray{r, core.NA * v / core.Radius, gamma}, 1.444)
		require.NoError(t, err)
		assert.InEpsilon(t, beta1, beta, 1e-15)
		assert.InEpsilon(t, l1, l, 1e-14)
	}
}
