package modes

import (
	"bufio"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"

	"glassthread/materials/domain"
)

const tableHeader = "radius_um,index_at_%s_nm"

// ReadMeasured reads the wavelength and the points of a measured profile from text in two
// columns with a comma between, the radius in micrometres and the index, under a header
// that names them and the wavelength in nanometres:
//
//	radius_um,index_at_1550_nm
//	0,1.4494
//	0.5,1.4493
//
// Empty lines and blanks around numbers are passed over. The error names the line.
func ReadMeasured(from io.Reader) (Measured, error) {
	const function = "modes.ReadMeasured"
	var t Measured
	var lines []int // of the points
	scanner := bufio.NewScanner(from)
	number, header := 0, false
	wrong := func(format string, args ...any) (Measured, error) {
		return Measured{}, fmt.Errorf("%s: line %d: %w", function, number, fmt.Errorf(format, args...))
	}
	for scanner.Scan() {
		number++
		text := strings.TrimSpace(strings.TrimPrefix(scanner.Text(), "\ufeff"))
		if text == "" {
			continue
		}
		first, second, two := strings.Cut(text, ",")
		first, second = strings.TrimSpace(first), strings.TrimSpace(second)
		if !header {
			header = true
			middle, ok := strings.CutPrefix(second, "index_at_")
			middle, unit := strings.CutSuffix(middle, "_nm")
			if first != "radius_um" || !ok || !unit {
				return wrong("the header is %.80q and must be like %q", text, fmt.Sprintf(tableHeader, "1550"))
			}
			x, ok := decimal(middle, -9)
			if !ok || !(x > 0) {
				return wrong("the wavelength is %.80q and must be a number of nanometres above 0", middle)
			}
			t.Wavelength = x
			continue
		}
		if !two || strings.Contains(second, ",") {
			return wrong("%.80q must be two numbers with a comma between", text)
		}
		r, ok := decimal(first, -6)
		if !ok {
			return wrong("the radius is %.80q and must be a number of micrometres", first)
		}
		n, ok := decimal(second, 0)
		if !ok {
			return wrong("the index is %.80q and must be a number", second)
		}
		if len(t.Points) == MaxMeasured {
			return wrong("more than %d points", MaxMeasured)
		}
		t.Points, lines = append(t.Points, MeasuredPoint{r, n}), append(lines, number)
	}
	if err := scanner.Err(); err != nil {
		number++
		return wrong("%w", err)
	}
	if !header {
		return Measured{}, errors.New(function + ": the text is empty")
	}
	if err := t.check(function); err != nil {
		var refused *domain.Error
		point := 0
		if errors.As(err, &refused) {
			if _, e := fmt.Sscanf(refused.Argument, "Points[%d]", &point); e == nil {
				number = lines[point]
				return wrong("%s = %v: must be %s", refused.Argument, refused.Value, refused.Allowed)
			}
		}
		return Measured{}, err
	}
	return t, nil
}

// Write writes the wavelength and the points as ReadMeasured reads them, exactly. What else
// a Measured holds are choices about them and is not written. A table that Fibre would
// refuse for its numbers is not written.
func (t Measured) Write(to io.Writer) error {
	if err := t.check("modes.Measured.Write"); err != nil {
		return err
	}
	out := bufio.NewWriter(to)
	fmt.Fprintf(out, tableHeader+"\n", decimalText(t.Wavelength, 9))
	for _, p := range t.Points {
		fmt.Fprintf(out, "%s,%s\n", decimalText(p.Radius, 6), decimalText(p.Index, 0))
	}
	return out.Flush()
}

// decimal reads a finite number times 10^shift, rounded once. A number in another unit and
// back is so the same number.
func decimal(text string, shift int) (float64, bool) {
	if text == "" || strings.Trim(text, "0123456789+-.eE") != "" {
		return 0, false
	}
	digits, exponent := text, 0
	if i := strings.IndexAny(text, "eE"); i >= 0 {
		var err error
		if exponent, err = strconv.Atoi(text[i+1:]); err != nil || exponent < -1000 || exponent > 1000 {
			return 0, false
		}
		digits = text[:i]
	}
	x, err := strconv.ParseFloat(fmt.Sprintf("%se%d", digits, exponent+shift), 64)
	return x, err == nil && math.Abs(x) <= math.MaxFloat64
}

// decimalText writes x times 10^shift so that decimal gives x back.
func decimalText(x float64, shift int) string {
	digits, exponent, _ := strings.Cut(strconv.FormatFloat(x, 'e', -1, 64), "e")
	n, _ := strconv.Atoi(exponent)
	text := fmt.Sprintf("%se%d", digits, n+shift)
	if y, ok := decimal(text, 0); ok && (y == 0 || math.Abs(y) >= 1e-6 && math.Abs(y) < 1e15) {
		plain := strconv.FormatFloat(y, 'f', -1, 64)
		if z, ok := decimal(plain, -shift); ok && z == x {
			return plain
		}
	}
	return text
}
