package model

import (
	"fmt"
	"testing"

	"sailby/report/fixture"
)

func TestLook(t *testing.T) {
	m := New(fixture.Report())
	for _, k := range "12345" {
		m.Press(Key{Letter, k})
		fmt.Println(Text(m.Rows(80, 24)))
	}
}
func Text(rows []Row) string {
	s := ""
	for _, r := range rows {
		s += r.Text + "\n"
	}
	return s
}
