package snell

import "math"

// twofold is the unevaluated sum of two float64, about 106 bits. It is used only
// where plain arithmetic would cancel: within a few digits of a critical or a
// Brewster angle. The sums and products are those of T. J. Dekker, Numer. Math.
// 18, 224 (1971), with the fused multiply-add in place of his splitting.
type twofold struct{ hi, lo float64 }

// quarterTurn is pi/2; thirdPart carries it beyond the two parts (DLMF 3.12.1).
var quarterTurn = twofold{0x1.921fb54442d18p+0, 0x1.1a62633145c07p-54}

const thirdPart = -0x1.f1976b7ed8fbcp-110

func twoSum(a, b float64) twofold {
	s := a + b
	t := s - a
	return twofold{s, (a - (s - t)) + (b - t)}
}

// quickSum is twoSum for |a| >= |b|.
func quickSum(a, b float64) twofold {
	s := a + b
	return twofold{s, b - (s - a)}
}

func twoProduct(a, b float64) twofold {
	p := float64(a * b) // the conversion keeps a compiler from fusing it
	return twofold{p, math.FMA(a, b, -p)}
}

func (x twofold) plus(y twofold) twofold {
	s := twoSum(x.hi, y.hi)
	t := twoSum(x.lo, y.lo)
	s = quickSum(s.hi, s.lo+t.hi)
	return quickSum(s.hi, s.lo+t.lo)
}

func (x twofold) minus(y twofold) twofold { return x.plus(twofold{-y.hi, -y.lo}) }

func (x twofold) times(y twofold) twofold {
	p := twoProduct(x.hi, y.hi)
	return quickSum(p.hi, p.lo+(x.hi*y.lo+x.lo*y.hi))
}

// sineSeries holds the coefficients 2^(2k-1)/(2k)! of
//
//	sin^2 x = (1 - cos 2x)/2 = x^2 - x^4/3 + 2 x^6/45 - ...  (DLMF 4.19.2)
//
// for k = 1, 2, ..., each as a twofold; a test recomputes them.
var sineSeries = [...]twofold{
	{0x1.0000000000000p+0, 0},
	{0x1.5555555555555p-2, 0x1.5555555555555p-56},
	{0x1.6c16c16c16c17p-5, -0x1.f49f49f49f49fp-60},
	{0x1.a01a01a01a01ap-9, 0x1.a01a01a01a01ap-69},
	{0x1.27e4fb7789f5cp-13, 0x1.cbbc05b4fa99ap-67},
	{0x1.1eed8eff8d898p-18, -0x1.2aec959e14c06p-72},
	{0x1.93974a8c07c9dp-24, 0x1.05d6f8a2efd1fp-79},
	{0x1.ae7f3e733b81fp-30, 0x1.1d8656b0ee8cbp-86},
	{0x1.6827863b97d97p-36, 0x1.eec01221a8b0bp-90},
	{0x1.e542ba4020225p-43, 0x1.ea72b4afe3c2fp-101},
	{0x1.0ce396db7f853p-49, -0x1.aebcdbd20331cp-103},
	{0x1.f2cf01972f578p-57, -0x1.9ada5fcc1ab14p-112},
	{0x1.88e85fc6a4e5ap-64, -0x1.71c37ebd16540p-118},
	{0x1.0a18a2635085dp-71, 0x1.b9e2e28e1aa54p-126},
	{0x1.3932c5047d60ep-79, 0x1.832b7b530a627p-133},
	{0x1.434d2e783f5bcp-87, 0x1.0b87b91be9affp-141},
	{0x1.2710231c0fd7ap-95, 0x1.3f8a2b4af9d6bp-151},
	{0x1.df983290c2ca9p-104, 0x1.5835c6895393bp-159},
}

// sineSquared returns sin^2 x for 0 <= x <= pi/4, to about 2^-102 relative.
func sineSquared(x twofold) twofold {
	y := x.times(x)
	// Below 2^-50 of the sum plain arithmetic is enough.
	const plain = 10
	tail := 0.0
	for k := len(sineSeries) - 1; k >= plain; k-- {
		tail = sineSeries[k].hi - y.hi*tail
	}
	sum := twofold{tail, 0}
	for k := plain - 1; k >= 0; k-- {
		sum = sineSeries[k].minus(y.times(sum))
	}
	return sum.times(y)
}
