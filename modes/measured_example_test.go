package modes_test

import (
	"fmt"
	"log"
	"os"
	"strings"

	"glassthread/materials"
	"glassthread/modes"
)

// A profiler measured a fibre of the Tarnwater buoys at 633 nm. Its composition, and so its
// modes at 1310 nm, follow. The fibre is invented.
func ExampleReadMeasured() {
	table, err := modes.ReadMeasured(strings.NewReader(`radius_um,index_at_633_nm
0,1.4635
1,1.4633
2,1.4628
3,1.4618
4,1.4600
4,1.4570
8,1.4570
`))
	if err != nil {
		log.Fatal(err)
	}
	fibre, err := table.Fibre()
	if err != nil {
		log.Fatal(err)
	}
	index, err := materials.Index(fibre.LP(0, 1), 1.31e-6)
	if err != nil {
		log.Fatal(err)
	}
	off, err := table.Error(0, 1, 1.31e-6, 5e-5)
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("effective index %.5f\n", index)
	fmt.Printf("from the spacing %.0e, from the noise %.0e\n", off.Interpolation, off.Noise)
	// Output:
	// effective index 1.44953
	// from the spacing 2e-05, from the noise 2e-05
}

func ExampleMeasured_Write() {
	table := modes.Measured{Wavelength: 1550e-9, Points: []modes.MeasuredPoint{{0, 1.4494}, {4.1e-6, 1.4494}, {4.1e-6, 1.444}}}
	if err := table.Write(os.Stdout); err != nil {
		log.Fatal(err)
	}
	// Output:
	// radius_um,index_at_1550_nm
	// 0,1.4494
	// 4.1,1.4494
	// 4.1,1.444
}
