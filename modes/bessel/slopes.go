package bessel

import "glassthread/materials/domain"

// The derivatives with respect to the argument, by arithmetic from values at hand. Each
// takes what the function of its name without Slope returned at the same l and x, and fails
// where that, or the derivative itself, is not finite.

// JRatioSlope returns d/dx of J_{l+1}(x)/J_l(x) from the ratio itself: the Riccati equation
// 1 + j^2 - (2l+1) j/x (DLMF 10.6.2). Next to a zero of J_l it is large; elsewhere its terms
// may cancel, for x below l down to 1/(2l + 2) of their size: its error is some 1e-16 of the
// largest term.
func JRatioSlope(l int, x, ratio float64) (float64, error) {
	const function = "bessel.JRatioSlope"
	if err := checkSlope(function, l, x, ratio); err != nil {
		return 0, err
	}
	slope := 1 + ratio*(ratio-float64(2*l+1)/x)
	return slope, domain.Result(function, "slope", slope)
}

// KRatioSlope returns d/dx of K_{l+1}(x)/K_l(x) from the ratio itself: the Riccati equation
// k^2 - 1 - (2l+1) k/x (DLMF 10.29.2). For large x the terms cancel, and the relative
// error grows like 1e-16 x^2/(2l+1): a weak corner.
func KRatioSlope(l int, x, ratio float64) (float64, error) {
	const function = "bessel.KRatioSlope"
	if err := checkSlope(function, l, x, ratio); err != nil {
		return 0, err
	}
	slope := (ratio-1)*(ratio+1) - float64(2*l+1)*ratio/x
	return slope, domain.Result(function, "slope", slope)
}

// IRatioSlope returns d/dx of I_{l+1}(x)/I_l(x) from the ratio itself: the Riccati equation
// 1 - i^2 - (2l+1) i/x (DLMF 10.29.2). The terms cancel for x above l, where the relative
// error grows like 1e-16 x^2/(2l+1), and for x below l, where it is about 1e-16 (2l+2): weak
// corners.
func IRatioSlope(l int, x, ratio float64) (float64, error) {
	const function = "bessel.IRatioSlope"
	if err := checkSlope(function, l, x, ratio); err != nil {
		return 0, err
	}
	slope := (1-ratio)*(1+ratio) - float64(2*l+1)*ratio/x
	return slope, domain.Result(function, "slope", slope)
}

// KScaledSlope returns d/dx of e^x K_l(x) from that value and the ratio K_{l+1}/K_l (DLMF
// 10.29.2). Its error is some 1e-16 of value times ratio.
func KScaledSlope(l int, x, value, ratio float64) (float64, error) {
	const function = "bessel.KScaledSlope"
	if err := checkSlope(function, l, x, ratio); err != nil {
		return 0, err
	}
	slope := value * (1 + float64(l)/x - ratio)
	return slope, domain.Result(function, "slope", slope)
}

// IScaledSlope returns d/dx of e^-x I_l(x) from that value and the ratio I_{l+1}/I_l (DLMF
// 10.29.2). Its error is some 1e-16 of the value times 1 + l/x.
func IScaledSlope(l int, x, value, ratio float64) (float64, error) {
	const function = "bessel.IScaledSlope"
	if err := checkSlope(function, l, x, ratio); err != nil {
		return 0, err
	}
	slope := value * (ratio - 1 + float64(l)/x)
	return slope, domain.Result(function, "slope", slope)
}

func checkSlope(function string, l int, x, ratio float64) error {
	if err := check(function, l, x); err != nil {
		return err
	}
	return domain.Finite(function, "ratio", ratio, "")
}
