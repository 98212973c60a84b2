// Package weld estimates how long joints take to weld: metal to deposit, runs, arc time,
// hands-on time, preheat and cooling, time before testing, consumables and power. Lengths are
// millimetres, areas square millimetres, masses kilograms, temperatures degrees Celsius.
package weld
