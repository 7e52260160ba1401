package main

import (
	"bufio"
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"runtime"
	"runtime/debug"
	"strconv"

	"github.com/spf13/cobra"

	"arrestcheck/limits"
	"arrestcheck/reportgen/archive"
)

const registerLong = `Lists many jobs, a row for each: which job it is, what its limits came to, the
worst of them, what is open or left out, rescue, who is named as checker, and
the digests of the job and of its results. A folder is searched with all that
is in it for files that end in .toml. - reads the names of files from standard
input, one a line. Limit files in either are left out, and counted.

The rows stand in the order of the names, however many workers there are. A job
that is refused has a row with its faults, and the run goes on. --against holds
the register against an earlier one, in CSV or JSON lines, and says which jobs
are new, changed, worse or gone; the files have to be named as they were then.
`

const (
	againstFlag = "against"
	workersFlag = "workers"
)

type registerFlags struct {
	format  choice
	ascii   bool
	limits  []string
	against string
	workers int
	fileFlags
}

func newRegister(o *outcome, in surroundings) *cobra.Command {
	var flags registerFlags
	cmd := &cobra.Command{
		Use:   "register FOLDER|FILE... [flags]",
		Short: "list many jobs, a row for each",
		Long:  registerLong,
		Example: `  arrestcheck register jobs
  arrestcheck register --format csv --out register.csv jobs
  arrestcheck register --against last-year.csv jobs
  find jobs -name '*.toml' | arrestcheck register --format jsonl -`,
		DisableFlagsInUseLine: true,
		Args:                  filesAndStdin,
		RunE: func(_ *cobra.Command, names []string) error {
			return flags.register(names, o, in)
		},
	}
	flags.format = oneOf("text", "csv", "jsonl")
	flags.format.flag(cmd, "format", "what is written")
	cmd.Flags().BoolVar(&flags.ascii, "ascii", false, "plain ASCII in text and csv")
	cmd.Flags().StringArrayVar(&flags.limits, "limits", nil, "a limit `FILE` for every job; repeatable")
	cmd.Flags().StringVar(&flags.against, againstFlag, "", "an earlier register, `FILE` in csv or jsonl")
	cmd.Flags().IntVar(&flags.workers, workersFlag, 0, "how many jobs at a time; 0: as many as processors")
	flags.fileFlags.add(cmd)
	return cmd
}

// register reads what all jobs share and leaves the rows to the end.
func (f *registerFlags) register(names []string, o *outcome, in surroundings) error {
	if err := f.conflict(); err != nil {
		return err
	}
	sets, used, err := readLimitFiles(f.limits)
	earlier, of, errEarlier := f.earlier()
	if of != nil {
		used = append(used, of)
	}
	if err := errors.Join(err, errEarlier, f.check(used)); err != nil {
		return flatten(err)
	}
	r := &registrar{flags: f, names: names, sets: sets, earlier: earlier, in: in}
	if to := f.out(); to != nil {
		r.forbidden, _ = os.Stat(to.path)
	}
	o.last = func(ctx context.Context, o *outcome, stdout io.Writer) error {
		return r.deliver(ctx, o, stdout)
	}
	return nil
}

func (f *registerFlags) conflict() error {
	if f.workers < 0 || f.workers > mostWorkers {
		return &usageError{fmt.Sprintf("--%s %d", workersFlag, f.workers), fmt.Sprintf("from 1 to %d, or 0 for as many as processors", mostWorkers)}
	}
	return f.fileFlags.conflict()
}

const mostWorkers = 256

// earlier reads the register of --against, nil where none is given.
func (f *registerFlags) earlier() (*archive.Earlier, fs.FileInfo, error) {
	if !f.flags.Changed(againstFlag) {
		return nil, nil, nil
	}
	file, err := openInput(f.against)
	if err != nil {
		return nil, nil, &fileError{"read", fmt.Sprintf("%q", f.against), err}
	}
	defer file.Close()
	info, err := file.Stat()
	if err != nil {
		return nil, nil, &fileError{"read", fmt.Sprintf("%q", f.against), err}
	}
	earlier, err := archive.ReadEarlier(file)
	var path *fs.PathError
	switch {
	case errors.As(err, &path):
		return nil, info, &fileError{"read", fmt.Sprintf("%q", f.against), err}
	case err != nil:
		return nil, info, &usageError{fmt.Sprintf("--%s %q is no register: %v", againstFlag, f.against, err),
			"name a register that --format csv or jsonl wrote"}
	}
	return earlier, info, nil
}

// A registrar makes one register.
type registrar struct {
	flags     *registerFlags
	names     []string
	in        surroundings
	sets      []limits.Set
	earlier   *archive.Earlier
	forbidden fs.FileInfo // the file that --out replaces: no job may be it

	jobs    int
	leftOut int // limit files in folders and lists
	code    exitCode
}

// deliver writes the register to where it belongs.
func (r *registrar) deliver(ctx context.Context, o *outcome, stdout io.Writer) error {
	to := r.flags.out()
	if to == nil {
		_, err := await(ctx, func() (struct{}, error) { return struct{}{}, r.write(ctx, stdout) })
		o.code, o.remarks = r.code, r.remarks()
		return err
	}
	temp, err := to.fillBy(func(w io.Writer) error { return r.write(ctx, w) })
	file := []pending{{destination: *to, temp: temp}}
	if err != nil {
		abandon(file)
		return r.named(err, fmt.Sprintf("%q", to.path))
	}
	o.code, o.remarks = r.code, r.remarks()
	return place(ctx, file)
}

// named puts the name of the destination to an error of writing.
func (r *registrar) named(err error, name string) error {
	var usage *usageError
	var file *fileError
	if errors.Is(err, context.Canceled) || errors.As(err, &usage) || errors.As(err, &file) {
		return err
	}
	return &fileError{"write", name, err}
}

// What may come anew before memory is cleaned up: garbage percent of what is in
// use, but no more than to roomy bytes in all. What is in use is little and soon
// done with: with the usual 100 percent a fifth of the time goes into it.
const (
	garbage = 400
	roomy   = 26 << 20
)

// write writes the whole register to w.
func (r *registrar) write(ctx context.Context, w io.Writer) error {
	defer debug.SetGCPercent(debug.SetGCPercent(garbage))
	defer debug.SetMemoryLimit(debug.SetMemoryLimit(roomy))
	buffered := bufio.NewWriterSize(w, 64<<10)
	register, err := archive.NewRegister(buffered, r.layout(), r.flags.ascii, r.earlier != nil)
	if err != nil {
		return err
	}
	err = r.rows(ctx, register)
	if err == nil {
		_, err = register.Close()
	}
	if err == nil {
		err = buffered.Flush()
	}
	if err != nil && r.flags.out() == nil && ctx.Err() == nil {
		return r.named(err, "standard output")
	}
	return err
}

func (r *registrar) layout() archive.Layout {
	switch r.flags.format.word {
	case "csv":
		return archive.CSV
	case "jsonl":
		return archive.Lines
	}
	return archive.Text
}

// rows adds a row for every job, in the order of the jobs, and one for every
// job that is gone.
func (r *registrar) rows(ctx context.Context, register *archive.Register) error {
	count, stop := showCount(ctx, r.in, "register", "jobs")
	defer stop()
	err := r.inOrder(ctx, func(row *archive.Row) error {
		if r.earlier != nil {
			r.earlier.Hold(row, func(now, then int) bool { return exitCode(now).worseThan(exitCode(then)) })
		}
		r.jobs++
		r.code = worst(r.code, exitCode(row.Code))
		count()
		return register.Add(row)
	})
	if r.jobs == 0 {
		r.code = exitOtherwise // a folder named wrongly must not look like one where all is settled
	}
	if err != nil || r.earlier == nil {
		return err
	}
	for _, row := range r.earlier.Gone() {
		if err := register.Add(&row); err != nil {
			return err
		}
	}
	return nil
}

func (r *registrar) remarks() []string {
	var list []string
	if r.jobs == 0 {
		list = append(list, "no job was named or found: the register is empty")
	}
	switch r.leftOut {
	case 0:
	case 1:
		list = append(list, "1 limit file is no job and has no row")
	default:
		list = append(list, strconv.Itoa(r.leftOut)+" limit files are no jobs and have no row")
	}
	return list
}

// workersOf returns how many jobs are worked out at a time.
func (f *registerFlags) workersOf() int {
	if f.workers > 0 {
		return f.workers
	}
	return min(runtime.GOMAXPROCS(0), mostWorkers)
}
