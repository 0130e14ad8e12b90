package bessel

// The derivatives with respect to the argument, by arithmetic from values at hand. Each
// takes what the function of its name without Slope returned at the same l and x.

// JRatioSlope returns d/dx of J_{l+1}(x)/J_l(x) from the ratio itself: the Riccati equation
// 1 + j^2 - (2l+1) j/x (DLMF 10.6.2). Next to a zero of J_l it is large, and elsewhere its
// terms may cancel: its error is some 1e-16 of the largest term.
func JRatioSlope(l int, x, ratio float64) float64 {
	return 1 + ratio*(ratio-float64(2*l+1)/x)
}

// KRatioSlope returns d/dx of K_{l+1}(x)/K_l(x) from the ratio itself: the Riccati equation
// k^2 - 1 - (2l+1) k/x (DLMF 10.29.2). For large x the terms cancel, and the relative
// error grows like 1e-16 x^2/(2l+1): a weak corner.
func KRatioSlope(l int, x, ratio float64) float64 {
	return (ratio-1)*(ratio+1) - float64(2*l+1)*ratio/x
}

// IRatioSlope returns d/dx of I_{l+1}(x)/I_l(x) from the ratio itself: the Riccati equation
// 1 - i^2 - (2l+1) i/x (DLMF 10.29.2). For large x the terms cancel, and the relative
// error grows like 1e-16 x^2/(2l+1): a weak corner.
func IRatioSlope(l int, x, ratio float64) float64 {
	return (1-ratio)*(1+ratio) - float64(2*l+1)*ratio/x
}

// KScaledSlope returns d/dx of e^x K_l(x) from that value and the ratio K_{l+1}/K_l (DLMF
// 10.29.2). Its error is some 1e-16 of value times ratio.
func KScaledSlope(l int, x, value, ratio float64) float64 {
	return value * (1 + float64(l)/x - ratio)
}

// IScaledSlope returns d/dx of e^-x I_l(x) from that value and the ratio I_{l+1}/I_l (DLMF
// 10.29.2). Its error is some 1e-16 of the value times 1 + l/x.
func IScaledSlope(l int, x, value, ratio float64) float64 {
	return value * (ratio - 1 + float64(l)/x)
}
