package instance

import (
	"fmt"
	"strings"
)

// parseSM reads a single-mode PSPLIB file: sections told by their headings, jobs counted from 1.
func (in *Instance) parseSM(text string) error {
	lines := strings.Split(text, "\n")
	follow := map[int][]int{}
	at := func(i int, err error) error { return fmt.Errorf("line %d: %w", i+1, err) }
	for i := 0; i < len(lines); i++ {
		switch {
		case strings.HasPrefix(lines[i], "PRECEDENCE RELATIONS"):
			for i += 2; i < len(lines) && !strings.HasPrefix(lines[i], "*"); i++ {
				v, err := numbers(lines[i])
				if err != nil {
					return at(i, err)
				}
				if len(v) < 3 || v[1] != 1 || v[2] < 0 || len(v) != 3+v[2] {
					return at(i, fmt.Errorf("want job, 1 mode, number of successors, successors; have %q", strings.TrimSpace(lines[i])))
				}
				follow[v[0]-1] = v[3:]
			}
		case strings.HasPrefix(lines[i], "REQUESTS/DURATIONS"):
			for i += 3; i < len(lines) && !strings.HasPrefix(lines[i], "*"); i++ {
				v, err := numbers(lines[i])
				if err != nil {
					return at(i, err)
				}
				if len(v) < 3 || v[0] != len(in.Length)+1 || len(v) > mostActivities {
					return at(i, fmt.Errorf("want job %d, mode, length, demands; have %q", len(in.Length)+1, strings.TrimSpace(lines[i])))
				}
				in.Length = append(in.Length, v[2])
				in.Demand = append(in.Demand, v[3:])
			}
		case strings.HasPrefix(lines[i], "RESOURCEAVAILABILITIES"):
			if i += 2; i >= len(lines) {
				return fmt.Errorf("the file ends before the capacities")
			}
			v, err := numbers(lines[i])
			if err != nil {
				return at(i, err)
			}
			in.Capacity = v
		}
	}
	for from := range in.Length {
		for _, to := range follow[from] {
			in.Lags = append(in.Lags, Lag{From: from, To: to - 1, Min: in.Length[from]})
		}
		delete(follow, from)
	}
	for from := range follow {
		return fmt.Errorf("job %d has successors but no length", from+1)
	}
	return nil
}

// parseSch reads a ProGen/max file: a line of sizes, a line of successors with lags for each
// activity, a line of demands for each, the capacities.
func (in *Instance) parseSch(text string) error {
	var lines []string
	for _, l := range strings.Split(text, "\n") {
		if strings.TrimSpace(l) != "" {
			lines = append(lines, l)
		}
	}
	if len(lines) == 0 {
		return fmt.Errorf("the file is empty")
	}
	head, err := numbers(lines[0])
	if err != nil || len(head) < 2 || head[0] < 0 || head[0] > mostActivities || head[1] < 0 || head[1] > mostActivities {
		return fmt.Errorf("line 1: want the numbers of activities and resources; have %q", strings.TrimSpace(lines[0]))
	}
	n, m := head[0]+2, head[1]
	if len(lines) < 2*n+2 {
		return fmt.Errorf("%d activities want %d lines, there are %d", n, 2*n+2, len(lines))
	}
	for i := 0; i < n; i++ {
		v, err := numbers(strings.NewReplacer("[", " ", "]", " ").Replace(lines[1+i]))
		if err != nil {
			return fmt.Errorf("successors of activity %d: %w", i, err)
		}
		if len(v) < 3 || v[0] != i || v[1] != 1 || v[2] < 0 || len(v) != 3+2*v[2] {
			return fmt.Errorf("successors of activity %d: want as many lags as successors; have %q", i, strings.TrimSpace(lines[1+i]))
		}
		for k := 0; k < v[2]; k++ {
			in.Lags = append(in.Lags, Lag{From: i, To: v[3+k], Min: v[3+v[2]+k]})
		}
	}
	for i := 0; i < n; i++ {
		v, err := numbers(lines[1+n+i])
		if err != nil {
			return fmt.Errorf("demands of activity %d: %w", i, err)
		}
		if len(v) != 3+m || v[0] != i {
			return fmt.Errorf("demands of activity %d: want activity, mode, length, %d demands; have %q", i, m, strings.TrimSpace(lines[1+n+i]))
		}
		in.Length = append(in.Length, v[2])
		in.Demand = append(in.Demand, v[3:])
	}
	v, err := numbers(lines[1+2*n])
	if err != nil || len(v) < m {
		return fmt.Errorf("capacities: want %d numbers; have %q", m, strings.TrimSpace(lines[1+2*n]))
	}
	in.Capacity = v[:m]
	return nil
}

// parseRcp reads a Patterson file: a stream of numbers.
func (in *Instance) parseRcp(text string) error {
	v, err := numbers(text)
	if err != nil {
		return err
	}
	next := func(n int) ([]int, error) {
		if n < 0 || n > len(v) {
			return nil, fmt.Errorf("the file ends %d numbers too early", n-len(v))
		}
		out := v[:n]
		v = v[n:]
		return out, nil
	}
	head, err := next(2)
	if err != nil {
		return err
	}
	n, m := head[0], head[1]
	if n < 0 || n > mostActivities || m < 0 {
		return fmt.Errorf("%d activities and %d resources cannot be", n, m)
	}
	if in.Capacity, err = next(m); err != nil {
		return err
	}
	for i := 0; i < n; i++ {
		row, err := next(2 + m)
		if err != nil {
			return err
		}
		in.Length = append(in.Length, row[0])
		in.Demand = append(in.Demand, row[1:1+m])
		follow, err := next(row[1+m])
		if err != nil {
			return err
		}
		for _, to := range follow {
			in.Lags = append(in.Lags, Lag{From: i, To: to - 1, Min: row[0]})
		}
	}
	return nil
}
