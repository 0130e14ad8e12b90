package bessel

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// NIST DLMF 10.21 (tables it cites) and M. Abramowitz and I. A. Stegun, Handbook of
// Mathematical Functions, 1964, table 9.5, from memory.
func TestZerosOfTheHandbook(t *testing.T) {
	for l, zeros := range [][]float64{
		{2.40482556, 5.52007811, 8.65372791, 11.79153444, 14.93091771},
		{3.83170597, 7.01558667, 10.17346814, 13.32369194, 16.47063005},
		{5.13562, 8.41724, 11.61984, 14.79595, 17.95982},
		{6.38016, 9.76102, 13.01520, 16.22347, 19.40942},
		{7.58834, 11.06471, 14.37254, 17.61597, 20.82693},
		{8.77148, 12.33860, 15.70017, 18.98013, 22.21780},
	} {
		for i, want := range zeros {
			half := 0.51e-5 // of the last decimal
			if l < 2 {
				half = 0.51e-8
			}
			got, err := JZero(l, i+1)
			require.NoError(t, err)
			assert.InDelta(t, want, got, half, "j(%d,%d)", l, i+1)
		}
	}
}

// Abramowitz and Stegun 1964, table 9.1 (10 decimals) and 9.4 (10 digits), from memory,
// recomputed with mpmath.
func TestJOfTheHandbook(t *testing.T) {
	for _, c := range []struct {
		l       int
		x, want float64
	}{
		{0, 1, 0.7651976866}, {1, 1, 0.4400505857}, {2, 1, 0.1149034849},
		{0, 2, 0.2238907791}, {1, 2, 0.5767248078}, {2, 2, 0.3528340286},
		{0, 5, -0.1775967713}, {1, 5, -0.3275791376}, {2, 5, 0.0465651163},
		{0, 10, -0.2459357645}, {1, 10, 0.0434727462}, {2, 10, 0.2546303137},
	} {
		got, err := J(c.l, c.x)
		require.NoError(t, err)
		assert.InDelta(t, c.want, got, 0.51e-10, "J_%d(%v)", c.l, c.x)
	}
	for _, c := range []struct {
		l       int
		x, want float64
	}{
		{5, 1, 2.497577302e-4}, {10, 1, 2.630615124e-10}, {20, 1, 3.873503009e-25},
		{30, 1, 3.482869794e-42}, {50, 1, 2.906004948e-80}, {100, 1, 8.431828790e-189},
		{5, 2, 7.039629756e-3}, {5, 5, 2.611405461e-1}, {10, 5, 1.467802647e-3},
		{10, 10, 2.074861066e-1}, {20, 10, 1.151336925e-5}, {30, 10, 1.551096078e-12},
		{10, 50, -1.138478491e-1}, {50, 50, 1.214090219e-1}, {100, 100, 9.636667330e-2},
	} {
		got, err := J(c.l, c.x)
		require.NoError(t, err)
		assert.InEpsilon(t, c.want, got, 5.1e-10, "J_%d(%v)", c.l, c.x)
	}
}

// J_l at the float64 nearest to a zero of J_0, where a downward recurrence scaled by J_0
// alone has no digits left. Values by mpmath's besselj at 30 digits.
func TestJAtZerosOfJ0(t *testing.T) {
	for _, c := range []struct {
		l       int
		x, want float64
	}{
		{3, 2.404825557695773, 0.19899990535769083152},
		{6, 2.404825557695773, 0.0034048184720278335564},
		{9, 2.404825557695773, 0.000012517270977961512384},
		{20, 2.404825557695773, 1.5310874781579102354e-17},
		{6, 5.520078110286311, 0.18913790473883965282},
		{10, 5.520078110286311, 0.0034615262380866191407},
		{9, 8.653727912911013, 0.18335325629164184332},
		{20, 8.653727912911013, 8.7474222565853363344e-7},
	} {
		got, err := J(c.l, c.x)
		require.NoError(t, err)
		assert.InEpsilon(t, c.want, got, 2e-15, "J_%d(%v)", c.l, c.x)
	}
}

// Abramowitz and Stegun 1964, table 9.8: e^-x I and e^x K to 10 decimals, from memory,
// recomputed with mpmath.
func TestIAndKOfTheHandbook(t *testing.T) {
	for _, c := range []struct{ x, i0, i1, k0, k1 float64 }{
		{1, 0.4657596076, 0.2079104153, 1.1444630798, 1.6361534863},
		{2, 0.3085083226, 0.2152692892, 0.8415682151, 1.0334768471},
		{5, 0.1835408126, 0.1639722669, 0.5478075643, 0.6002738588},
		{10, 0.1278333372, 0.1212626814, 0.3916319344, 0.4107665706},
	} {
		for _, f := range []struct {
			name string
			f    func(int, float64) (float64, error)
			want [2]float64
		}{{"I", IScaled, [2]float64{c.i0, c.i1}}, {"K", KScaled, [2]float64{c.k0, c.k1}}} {
			for l, want := range f.want {
				got, err := f.f(l, c.x)
				require.NoError(t, err)
				assert.InDelta(t, want, got, 0.51e-10, "%s_%d(%v)", f.name, l, c.x)
			}
		}
		i, err := IRatio(0, c.x)
		require.NoError(t, err)
		assert.InDelta(t, c.i1/c.i0, i, 1e-9)
		k, err := KRatio(0, c.x)
		require.NoError(t, err)
		assert.InDelta(t, c.k1/c.k0, k, 1e-9)
		g, err := Decay(1, c.x)
		require.NoError(t, err)
		assert.InDelta(t, c.x*c.k0/c.k1, g, 1e-9*c.x)
	}
}

// Sums over all orders: J_0 + 2 (J_2 + J_4 + ...) = 1 (DLMF 10.12.4), J_0^2 + 2 (J_1^2 + J_2^2
// + ...) = 1 (DLMF 10.23.3), e^-x (I_0 + 2 (I_1 + I_2 + ...)) = 1 (DLMF 10.35.5). They
// cross the turning point, x = l.
func TestSumsOverOrders(t *testing.T) {
	for _, x := range []float64{0.01, 0.3, 1, 2.404825557695773, 3.7, 5, 8.653727912911013, 20, 33.3, 100, 777.7} {
		var even, squares, modified float64
		for l := 0; float64(l) < x+30*math.Cbrt(x)+30; l++ {
			twice := 2.0
			if l == 0 {
				twice = 1
			}
			j, err := J(l, x)
			require.NoError(t, err)
			i, err := IScaled(l, x)
			if err == nil {
				modified += twice * i
			}
			if l%2 == 0 {
				even += twice * j
			}
			squares += twice * j * j
		}
		t.Logf("x = %v: even %.2g, squares %.2g, modified %.2g", x, even-1, squares-1, modified-1)
		assert.InDelta(t, 1, even, 2e-14, "x = %v", x)
		assert.InDelta(t, 1, squares, 2e-15, "x = %v", x)
		assert.InDelta(t, 1, modified, 2e-15, "x = %v", x)
	}
}
