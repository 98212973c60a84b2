// Package weld estimates how long joints take to weld: metal to deposit, runs, arc time,
// hands-on time, preheat and cooling, time before testing, consumables and power. Lengths are
// millimetres, areas square millimetres, masses kilograms, temperatures degrees Celsius, times
// minutes, and arc, hands-on and clock minutes are three types.
//
// # From a drawing to hours
//
// A [Seam] is a [Joint] (ISO 2553, ISO 9692-1) in a [Position] (ISO 6947) with a [Procedure]
// (process by ISO 4063). [Work] takes a task's seams through these steps; each number keeps an
// origin.Figure that says what it was made from:
//
//  1. Section: the drawn area, and the area laid. Fillets are laid 1 mm over the drawn leg (1.36
//     times the metal at 6 mm), butts get a cap of 1.5 mm, unless Circumstances.NoOverweld.
//  2. Metal: area x length x density. A position changes the metal of a butt through its
//     preparation angle and through what is really deposited there.
//  3. Rate: kilograms an hour with the arc burning; given, from the wire feed, or from current
//     and size. A position slows it only where the rate is the flat position's.
//  4. Runs: area over what one run lays. The root of a butt is a run of its own.
//  5. Arc time: metal over rate; for fillets with a travel speed also length over speed, the
//     longer of both, and a warning where they disagree.
//  6. Hands-on time: arc time over the operating factor or the set's duty cycle, whichever is
//     tighter, never their product; or the sum of its parts. Fit-up and tacks, leads and staging,
//     gouging, turning and preheat along the seam stand apart and are added.
//  7. Heat: EN 1011-1 heat input, preheat by the procedure or the standard that the job names,
//     t8/5, waits between runs, cooling, and the hours before final testing.
//
// # The operating factor
//
// It is arc time over hands-on welding time. It holds slag, electrode changes, moving along the
// seam, the hood, a look at the run. It never holds fit-up, tacks, preheat, gouging, moving leads
// or staging, nor the hours of the day that are not at the face (the place's face factor).
//
// # Where a seam may be stopped
//
// Not before its safe stop: root and second run all along, or a third of the thickness,
// whichever is later; in seams of one or two runs a third of the length at full size. Every seam
// of a task must have reached it. Tacks alone never carry a lift or a tide.
//
// # Power and cables
//
// A set draws volts x current over its efficiency and power factor; a generator for it gives 1.35
// times that at the most current of the set, and no less. A welding cable may lose 4 V, a supply
// cable 5 % of the supply's volts, there and back, before a warning says so.
//
// # What is not here
//
// EN 1011-2 method A is a set of charts; the package says with what to enter them and takes the
// reading as the procedure's preheat. What a WPS says governs; calculation stands beside it.
//
// # Sources
//
// Figures marked as published are from TWI Job Knowledge, ESAB and CIGWELD handbooks and lessons,
// AWS D1.1, EN 1011-1 and 1011-2, EN 1090-2, IEC 60974-1 and the papers named with
// them. Figures from memory and of house judgement are defaults: every one can be given.
package weld
