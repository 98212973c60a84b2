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
//  2. Metal: area x length x density; once round a tube, or round the saddle of a branch, where no
//     length is given. A position changes the metal of a butt through its
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
// Zero in a field means the usual value, and the figure says so; [None] means that there is truly
// nothing. What a joint does not have is refused, not left unsaid.
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
// # Preheat
//
// What the procedure says governs. Else the standard that the job names: AWS D1.1 by its table,
// EN 1011-2 method B by its formula where the CET is known, each with its range, and a warning that
// names the figure which lies outside. Method A is a set of charts that are not here: the package
// works out the carbon equivalent, the combined thickness, the hydrogen scale and the heat input with
// which to enter them, and takes a [ChartReading] for every seam that asks for no more of the
// chart. Plain thin steel is left in peace.
//
// # Cutting, preparing, testing, repair
//
// [Cut] goes by a table of speeds with its limit, or by the house's own [CutTable]; [Prepare] by
// the rates of [Activities], all of them house judgement; [Test] has dwell times and pressure
// limits; [Estimate.Repair] is the repair to allow for, with its chance. Each gives the hands-on
// time and what it uses up.
//
// # Order of welding
//
// [OrderOf] advises an order in which the shrinkage moment, weld area times lever arm, stays small
// about the neutral axis; [Bow] turns a moment into millimetres. Drawing, WPS and jig come first.
//
// # A check for the whole
//
// [Day] and [SiteDay] give metres a welder in a day: on site practice knows 5 to 8 m of 6 to 8 mm
// fillet in ten hours, all in. An estimate far from that is wrong, whatever its parts say.
//
// # Sources
//
// Figures marked as published are from TWI Job Knowledge, ESAB and CIGWELD handbooks and lessons,
// AWS D1.1, EN 1011-1 and 1011-2, EN 1090-2, IEC 60974-1 and the papers named with
// them. Figures from memory and of house judgement are defaults: every one can be given.
package weld
