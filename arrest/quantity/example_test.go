package quantity_test

import (
	"errors"
	"fmt"

	"arrestcheck/arrest/quantity"
)

func ExampleParse() {
	b, _ := quantity.Parse(quantity.Length, "6 ft 4 1/2 in ± 1/2 in")
	fmt.Println(b.Low, b.Value, b.High, b.Unit.Symbol)
	// Output: 1.9304 1.9431 1.9558 ft
}

func ExampleError() {
	_, err := quantity.Parse(quantity.Force, "1,800 lbf")
	fmt.Println(err)
	if e := (*quantity.Error)(nil); errors.As(err, &e) {
		fmt.Println("write", e.Example)
	}
	// Output:
	// "1,800 lbf": a comma is not read, since it can separate thousands or be a decimal sign: 1800 lbf or 1.8 lbf
	// write 1800 lbf or 1.8 lbf
}

func ExampleFormat() {
	limit, _ := quantity.Parse(quantity.Force, "1800 lbf")
	kN, _ := quantity.LookUp("kN")
	fmt.Println(quantity.Format(limit.Value, kN, 3, quantity.Down))
	fmt.Println(quantity.Format(limit.Value, kN, 3, quantity.Up))
	fmt.Println(quantity.Format(limit.Value, limit.Unit, 5, quantity.Nearest))
	// Output:
	// 8.00 kN
	// 8.01 kN
	// 1800.0 lbf
}

func ExampleSum() {
	body, _ := quantity.Parse(quantity.Mass, "203 lb ± 2 lb")
	tools, _ := quantity.Parse(quantity.Mass, "0 lb .. 20 lb")
	total := quantity.Sum(body, tools)
	fmt.Println(total.Text)
	fmt.Println(quantity.Format(total.High, total.Unit, 4, quantity.Up))
	// Output:
	// (203 lb ± 2 lb) + (0 lb .. 20 lb)
	// 225.0 lb
}
