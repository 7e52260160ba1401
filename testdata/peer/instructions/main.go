// Instructions runs the five-part path n times, for a count of instructions:
//
//	go build -o DIR/instructions ./testdata/peer/instructions
//	export GODEBUG=asyncpreemptoff=1 GOGC=off GOMAXPROCS=1
//	valgrind --tool=callgrind --callgrind-out-file=/dev/null DIR/instructions exact 1000
//
// at n and 3 n; the difference of the two "refs" over 2 n is the number of one
// run. The works are exact, set (the path is made anew before each exact run),
// dormandprince (at 1e-8) and floor (the bare evaluation of M-10).
//
//	DIR/instructions ratio 21
//
// takes turns between exact, dormandprince and floor in that many rounds and
// prints the processor time of each and the median of the ratios of the rounds.
package main

import (
	"fmt"
	"os"
	"runtime"
	"slices"
	"strconv"
	"syscall"

	"arrestcheck/arrest/connector"
)

func main() {
	if len(os.Args) != 3 {
		fmt.Fprintln(os.Stderr, "usage: instructions exact|set|dormandprince|floor|ratio N")
		os.Exit(2)
	}
	n, err := strconv.Atoi(os.Args[2])
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(2)
	}
	if os.Args[1] == "ratio" {
		err = ratio(n)
	} else {
		var peak float64
		peak, err = work(os.Args[1], n)
		fmt.Println(peak)
	}
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}

// work does one work n times and returns the mean of the peaks.
func work(what string, n int) (float64, error) {
	const corner = 4000. / 60000
	parts := []connector.Part{
		connector.Loose(0.2),
		connector.FromPoints([]connector.Point{
			{Extension: 0, Force: 0}, {Extension: corner, Force: 4000},
			{Extension: corner + 0.4, Force: 4800}, {Extension: corner + 0.5, Force: 12800},
		}, 100000),
		connector.NewDashpot(150),
	}
	fall := connector.Fall{Mass: 100, FreeFall: 1.6, Gravity: connector.StandardGravity, Duration: 0.5}
	var path connector.Path
	var result connector.Result
	if err := path.Set(parts...); err != nil {
		return 0, err
	}
	sum := 0.0
	for range n {
		var err error
		switch what {
		case "exact":
			err = connector.Run(&path, &fall, &result)
		case "set":
			if err = path.Set(parts...); err == nil {
				err = connector.Run(&path, &fall, &result)
			}
		case "dormandprince":
			err = connector.Integrate(&path, &fall, 1e-8, &result)
		case "floor":
			result.Peak = connector.ElasticPeak(fall.Mass, 6, 9000, fall.Gravity)
		default:
			err = fmt.Errorf("no work is called %q", what)
		}
		if err != nil {
			return 0, err
		}
		sum += result.Peak
	}
	return sum / float64(n), nil
}

// used returns the processor time of this process in ns.
func used() float64 {
	var u syscall.Rusage
	syscall.Getrusage(syscall.RUSAGE_SELF, &u)
	return float64(u.Utime.Nano() + u.Stime.Nano())
}

// ratio compares the works round by round.
func ratio(rounds int) error {
	runtime.LockOSThread()
	works := []struct {
		name string
		n    int
		ns   []float64
	}{{name: "exact", n: 20000}, {name: "dormandprince", n: 2000}, {name: "floor", n: 2000000}}
	var over []float64
	for range rounds {
		for i := range works {
			w := &works[i]
			from := used()
			if _, err := work(w.name, w.n); err != nil {
				return err
			}
			w.ns = append(w.ns, (used()-from)/float64(w.n))
		}
		last := len(over)
		over = append(over, works[1].ns[last]/works[0].ns[last])
	}
	for _, w := range works {
		fmt.Printf("%-14s %10.1f ns, median of %d rounds\n", w.name, median(w.ns), rounds)
	}
	fmt.Printf("dormandprince over exact: %.2f, median of the rounds\n", median(over))
	return nil
}

func median(x []float64) float64 {
	slices.Sort(x)
	return x[len(x)/2]
}
