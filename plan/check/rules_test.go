package check

import (
	"testing"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// TestOneRuleBroken: each case is a valid plan first, and breaks one rule alone after spoil.
func TestOneRuleBroken(t *testing.T) {
	for _, tc := range oneRule {
		t.Run(tc.rule+" "+tc.name, func(t *testing.T) {
			f := newFix(t)
			tc.build(f)
			f.wants("")
			tc.spoil(f)
			f.wants(tc.rule)
		})
	}
}

// fitUp is an hour of one fitter at the pier on Tuesday morning, by Tom.
func fitUp(f *fix) {
	f.put(f.work("fit", tasks.FitUp, f.deck, 60, need("fitter")), "Tom", "04-06 08:00-09:00")
}

// overNight is six hours of one fitter over the night to Wednesday, with set-up and safe point.
func overNight(f *fix) {
	s := f.work("fit", tasks.FitUp, f.deck, 240, need("fitter"))
	s.SetUp, s.LeastPiece, s.SafeStop = 10, 60, 100
	f.put(s, "Tom", "04-06 16:00-18:00", "04-07 08:00-10:20")
}

// twoFits are two fit-ups in a row, linked.
func twoFits(f *fix) {
	a := f.work("first", tasks.FitUp, f.deck, 60, need("fitter"))
	b := f.work("second", tasks.FitUp, f.slip, 60, need("fitter"))
	f.put(a, "Tom", "04-06 08:00-09:00")
	f.put(b, "Ruaridh", "04-06 10:00-11:00")
}

// coated is a coat at the hinge with its films, and a weld of the deck beside it, late enough.
func coated(f *fix) {
	c := f.task("paint", tasks.Coat, f.pier, f.hinge)
	coat := f.step(c, "coat 1", 60, need("painter"))
	coat.InOneGo = true
	tail := func(n hours.Minute) func(hours.Minute) hours.Minute {
		return func(finish hours.Minute) hours.Minute { return finish + n }
	}
	coat.States = []expand.State{{Name: tasks.WetFilm, Tail: tail(60)}, {Name: tasks.SoftFilm, Tail: tail(300)}, {Name: tasks.Solvent, Tail: tail(180)}}
	coat.Works = []string{"frame"}
	dry := f.film(c, "hard dry", 300)
	f.link(coat, dry, 0, 0)
	f.put(coat, "Ruaridh", "04-06 08:00-09:00")
	f.put(dry, "", "04-06 09:00-14:00")
	weld := f.work("tack", tasks.Weld, f.deck, 60, tasks.Need{Ticket: tasks.Ticket{Name: "weld"}, Count: 1})
	weld.Hot, weld.Watch, weld.Lone = true, 60, true
	p := f.put(weld, "Ines", "04-06 12:30-13:30")
	f.watch(p, "Ines", "04-06 13:30-14:30")
}

var oneRule = []struct {
	rule, name   string
	build, spoil func(*fix)
}{
	{"R1", "somebody is not where they work", fitUp, func(f *fix) { f.tom.Places = []string{"shop"} }},
	{"R1", "somebody is there only later", fitUp, func(f *fix) { f.tom.From = moment(f.t, "04-06 08:30") }},
	{"R1", "somebody from outside is not booked", func(f *fix) {
		f.put(f.work("look", tasks.SignOff, f.deck, 30, need("inspector")), "Ms Reid", "04-06 10:00-10:30")
	}, func(f *fix) { f.move(0, "04-06 11:15-11:45") }},
	{"R1", "kit stays elsewhere", func(f *fix) {
		fitUp(f)
		f.job.Kit = []*tasks.Kit{{Name: "beam hoist", Count: 1}}
		f.w.Steps[0].Kit = []expand.Use{{Kit: f.job.Kit[0], Count: 1}}
	}, func(f *fix) { f.job.Kit[0].At = f.shop }},
	{"R1", "kit is away", func(f *fix) {
		f.mate.Places = []string{"shop"}
		f.job.Kit = []*tasks.Kit{{Name: "grinder", Count: 1}}
		s := f.step(f.task("cut", tasks.Cut, f.shop, nil), "cut", 60, need("fitter"))
		s.Kit = []expand.Use{{Kit: f.job.Kit[0], Count: 1}}
		f.put(s, "Ruaridh", "04-02 08:00-09:00")
	}, func(f *fix) { f.move(0, "04-06 08:00-09:00") }},
	{"R1", "an assembly leaves before it is done", func(f *fix) {
		f.mate.Places = []string{"shop"}
		fitUp(f)
		f.w.Steps[0].Works = []string{"frame"}
		s := f.step(f.task("cut", tasks.Cut, f.shop, nil), "cut", 60, need("fitter"))
		s.Works = []string{"frame"}
		f.put(s, "Ruaridh", "04-02 08:00-09:00")
	}, func(f *fix) { f.move(1, "04-06 08:00-09:00") }},
	{"R2", "a plan for another trip", fitUp, func(f *fix) {
		f.job.Trips = append(f.job.Trips, &tasks.Trip{Name: "next", Place: f.pier})
		f.p.Basis.Trip = "next"
	}},
	{"R2", "a window that is not the trip's", fitUp, func(f *fix) { f.w.Window.Opens += 30 }},
	{"R2", "before the window opens", func(f *fix) {
		f.tom.Places, f.job.Trips[0].People = []string{"pier"}, []string{"Ines", "Tom"}
		f.pier.Open = week(f.t, "daily 07:00-18:00")
		f.put(f.work("fit", tasks.FitUp, f.deck, 60, need("fitter")), "Tom", "04-05 08:00-09:00")
	}, func(f *fix) { f.move(0, "04-05 07:00-08:00") }},
	{"R2", "after the window closes", fitUp, func(f *fix) { f.move(0, "04-09 16:30-17:30") }},
	{"R2", "hard dry after the window closes", coated, func(f *fix) {
		f.move(0, "04-09 13:00-14:00")
		f.move(1, "04-09 14:00-19:00")
	}},
	{"R3", "a plan for other hours", fitUp, func(f *fix) { f.p.Basis.End = expand.High }},
	{"R3", "a plan without the maybes", fitUp, func(f *fix) { f.w.Basis.Maybes = true }},
	{"R4", "pieces do not begin at the start", fitUp, func(f *fix) { f.p.Steps[0].Start -= 10 }},
	{"R4", "pieces do not end at the finish", fitUp, func(f *fix) { f.p.Steps[0].Finish += 10 }},
	{"R4", "a step left out", fitUp, func(f *fix) { f.p.Steps = nil }},
	{"R4", "a step planned twice", fitUp, func(f *fix) { f.p.Steps = append(f.p.Steps, f.p.Steps[0]) }},
	{"R4", "a step that is not of the job", fitUp, func(f *fix) { f.p.Steps = append(f.p.Steps, plan.Step{Task: "x", Step: "y"}) }},
	{"R4", "no minutes but time taken", func(f *fix) {
		f.put(f.work("mark", tasks.Plain, f.deck, 0), "", "04-06 02:00-02:01")
		f.p.Steps[0].Pieces, f.p.Steps[0].Finish = nil, f.p.Steps[0].Start
	}, func(f *fix) { f.p.Steps[0].Finish += 5 }},
	{"R4", "the face factor forgotten", func(f *fix) {
		fitUp(f)
		f.pier.FaceFactor.Value, f.w.Steps[0].HandsOn = 0.7, 42
	}, func(f *fix) { f.pier.FaceFactor.Value = 0.6 }},
	{"R4", "standing time cut short", func(f *fix) {
		f.put(f.standing(f.task("set", tasks.Plain, f.pier, f.deck), "set", 600), "", "04-06 20:00-06:00")
	}, func(f *fix) { f.move(0, "04-06 20:00-05:00") }},
	{"R5", "outside opening hours", fitUp, func(f *fix) { f.move(0, "04-06 07:30-08:30") }},
	{"R5", "on a closed day", fitUp, func(f *fix) {
		f.pier.Closed = map[hours.Date]string{{Year: 2027, Month: 4, Day: 6}: "gala"}
	}},
	{"R5", "in the opening up", fitUp, func(f *fix) { f.pier.OpeningUp.Value = 20 }},
	{"R5", "in the clearing up", func(f *fix) { fitUp(f); f.move(0, "04-06 17:00-18:00") }, func(f *fix) { f.pier.ClearingUp.Value = 20 }},
	{"R5", "the workface is under water", fitUp, func(f *fix) { f.deck.Reach = []tasks.Slot{slot(f.t, "04-06 08:30-11:00")} }},
	{"R5", "too late to get off before the water", fitUp, func(f *fix) {
		f.deck.Reach = []tasks.Slot{slot(f.t, "04-06 06:00-09:20")}
		f.deck.WayOff.Value = 30
	}},
	{"R5", "wet steel", fitUp, func(f *fix) { f.deck.Dry = []tasks.Slot{slot(f.t, "04-06 10:00-17:00")} }},
	{"R5", "noise before noise hours", func(f *fix) { fitUp(f); f.w.Steps[0].Noisy = true }, func(f *fix) { f.pier.Noisy = week(f.t, "Mon-Sat 09:00-17:00") }},
	{"R5", "in the dark", func(f *fix) {
		fitUp(f)
		f.w.Steps[0].Light = true
		f.pier.Open = week(f.t, "daily 08:00-24:00")
	}, func(f *fix) { f.move(0, "04-06 22:00-23:00") }},
	{"R5", "outside somebody's hours", fitUp, func(f *fix) { f.tom.Hours = week(f.t, "daily 09:00-18:00") }},
	{"R5", "on a day off", fitUp, func(f *fix) { f.tom.Off = map[hours.Date]bool{{Year: 2027, Month: 4, Day: 6}: true} }},
	{"R5", "too short", fitUp, func(f *fix) { f.move(0, "04-06 08:00-08:50") }},
	{"R5", "too long", fitUp, func(f *fix) { f.move(0, "04-06 08:00-09:10") }},
	{"R5", "a gap by choice", fitUp, func(f *fix) { f.move(0, "04-06 08:00-08:30", "04-06 09:00-09:30") }},
	{"R6", "in one go, over a night", func(f *fix) { fitUp(f); f.w.Steps[0].InOneGo = true }, func(f *fix) { f.move(0, "04-06 17:30-18:00", "04-07 08:00-08:30") }},
	{"R6", "in one go, over a meal", func(f *fix) {
		fitUp(f)
		f.w.Steps[0].InOneGo, f.w.Steps[0].OverMeals = true, true
		f.move(0, "04-06 11:30-12:00", "04-06 12:30-13:00")
	}, func(f *fix) { f.w.Steps[0].OverMeals = false }},
	{"R7", "more kit than there is", func(f *fix) {
		twoFits(f)
		f.job.Kit = []*tasks.Kit{{Name: "hoist", Count: 1}}
		for _, s := range f.w.Steps {
			s.Kit = []expand.Use{{Kit: f.job.Kit[0], Count: 1}}
		}
	}, func(f *fix) { f.move(1, "04-06 08:30-09:30") }},
	{"R7", "kit that stays is used in a pause", func(f *fix) {
		overNight(f)
		f.put(f.work("lash", tasks.FitUp, f.slip, 20, need("fitter")), "Ruaridh", "04-06 18:00-18:20")
		f.pier.AlsoOpen = []tasks.Slot{slot(f.t, "04-06 18:00-18:20")}
		f.tom.Hours = week(f.t, "daily 08:00-12:00 12:30-18:00")
		f.job.Kit = []*tasks.Kit{{Name: "hoist", Count: 1}}
		for _, s := range f.w.Steps {
			s.Kit = []expand.Use{{Kit: f.job.Kit[0], Count: 1}}
		}
	}, func(f *fix) { f.w.Steps[0].Kit[0].Stays = true }},
	{"R7", "more power than the generator gives", func(f *fix) {
		twoFits(f)
		f.job.Kit = []*tasks.Kit{{Name: "generator", Count: 1, Gives: 15}}
		f.w.Steps[0].Power, f.w.Steps[1].Power = 9, 9
	}, func(f *fix) { f.move(1, "04-06 08:30-09:30") }},
	{"R7", "more power than the mains give", func(f *fix) {
		fitUp(f)
		f.w.Steps[0].Power = 9
		f.pier.Mains.Value = 9
	}, func(f *fix) { f.pier.Mains.Value = 6 }},
	{"R7", "the generator's hire ends", func(f *fix) {
		fitUp(f)
		f.w.Steps[0].Power = 9
		f.job.Kit = []*tasks.Kit{{Name: "generator", At: f.pier, Count: 1, Gives: 15, Slots: []tasks.Slot{slot(f.t, "04-06 08:00-09:00")}}}
	}, func(f *fix) { f.job.Kit[0].Slots = []tasks.Slot{slot(f.t, "04-06 08:00-08:40")} }},
	{"R7", "an assembly is lifted while it is worked on", func(f *fix) {
		twoFits(f)
		f.w.Steps[0].Works, f.w.Steps[1].Moves = []string{"frame"}, "frame"
	}, func(f *fix) { f.move(1, "04-06 08:30-09:30") }},
	{"R7", "a generator at home adds to the mains while it is there", func(f *fix) {
		f.mate.Places = []string{"shop"}
		f.job.Kit = []*tasks.Kit{{Name: "generator", Count: 1, Gives: 15}}
		f.shop.Mains.Value = 5
		s := f.step(f.task("cut", tasks.Cut, f.shop, nil), "cut", 60, need("fitter"))
		s.Power = 9
		f.put(s, "Ruaridh", "04-02 08:00-09:00")
	}, func(f *fix) { f.move(0, "04-06 08:00-09:00") }},
	{"R8", "no set-up after a stop", overNight, func(f *fix) { f.move(0, "04-06 16:00-18:00", "04-07 08:00-10:10") }},
	{"R8", "stopped before the safe point", overNight, func(f *fix) { f.w.Steps[0].SafeStop = 111 }},
	{"R8", "a first piece too short", overNight, func(f *fix) { f.w.Steps[0].LeastPiece = 111 }},
	{"R8", "an opening is skipped that has room", func(f *fix) {
		overNight(f)
		f.deck.Reach = []tasks.Slot{slot(f.t, "04-06 08:00-18:00"), slot(f.t, "04-07 08:00-09:05"), slot(f.t, "04-07 10:00-18:00")}
		f.move(0, "04-06 16:00-18:00", "04-07 10:00-12:00", "04-07 12:30-12:50")
	}, func(f *fix) { f.w.Steps[0].LeastPiece = 55 }},
	{"R8", "an opening is used that has no room", func(f *fix) {
		overNight(f)
		f.deck.Reach = []tasks.Slot{slot(f.t, "04-06 08:00-18:00"), slot(f.t, "04-07 08:00-09:05"), slot(f.t, "04-07 10:00-18:00")}
		f.move(0, "04-06 16:00-18:00", "04-07 10:00-12:00", "04-07 12:30-12:50")
	}, func(f *fix) { f.move(0, "04-06 16:00-18:00", "04-07 08:00-09:05", "04-07 10:00-11:25") }},
	{"R9", "no ticket", fitUp, func(f *fix) { f.p.Steps[0].People[0] = "Ines" }},
	{"R9", "somebody else than named", func(f *fix) { fitUp(f); f.w.Steps[0].Needs[0].Who = []string{"Tom"} }, func(f *fix) { f.p.Steps[0].People[0] = "Ruaridh" }},
	{"R9", "one of two tickets", func(f *fix) {
		fitUp(f)
		f.p.Steps[0].People[0] = "Ruaridh"
		f.w.Steps[0].Needs[0].Also = ticket("painter")
	},
		func(f *fix) { f.p.Steps[0].People[0] = "Tom" }},
	{"R9", "nobody in the job", fitUp, func(f *fix) { f.p.Steps[0].People[0] = "Nobody" }},
	{"R9", "too few people", fitUp, func(f *fix) { f.w.Steps[0].Needs[0].Count = 2 }},
	{"R9", "one person for two needs", func(f *fix) {
		fitUp(f)
		f.w.Steps[0].Needs[0].Count = 2
		f.p.Steps[0].People = []string{"Tom", "Ruaridh"}
	},
		func(f *fix) { f.p.Steps[0].People[1] = "Tom" }},
	{"R9", "outside people do not fill a need for anybody", func(f *fix) {
		f.put(f.work("hold", tasks.FitUp, f.deck, 60, tasks.Need{Count: 1}), "Ines", "04-06 10:00-11:00")
	}, func(f *fix) { f.p.Steps[0].People[0] = "Ms Reid" }},
	{"R9", "two steps at once", twoFits, func(f *fix) {
		f.p.Steps[1].People[0] = "Tom"
		f.move(1, "04-06 08:30-09:30")
	}},
	{"R9", "may not change hands", relieved, func(f *fix) { f.w.Steps[0].ChangeHands = false }},
	{"R9", "the second team works out of turn", relieved, func(f *fix) { f.p.Steps[0].Shifts = []int{0, 1, 1} }},
	{"R10", "too early", func(f *fix) { twoFits(f); f.link(f.w.Steps[0], f.w.Steps[1], 60, expand.NoMax) }, func(f *fix) { f.w.Links[0].Min = 61 }},
	{"R10", "too late", func(f *fix) { twoFits(f); f.link(f.w.Steps[0], f.w.Steps[1], 0, 60) }, func(f *fix) { f.w.Links[0].Max = 59 }},
	{"R10", "working hours not passed", func(f *fix) {
		twoFits(f)
		f.move(1, "04-07 09:00-10:00")
		f.link(f.w.Steps[0], f.w.Steps[1], 9*60+30, expand.NoMax).Working = true // Tuesday 9 to 18 less a meal, Wednesday 8 to 9
	}, func(f *fix) { f.w.Links[0].Min++ }},
	{"R10", "working hours exceeded", func(f *fix) {
		twoFits(f)
		f.move(1, "04-07 09:00-10:00")
		f.link(f.w.Steps[0], f.w.Steps[1], 0, 9*60+30).MaxWorking = true
	}, func(f *fix) { f.w.Links[0].Max-- }},
	{"R10", "not before", func(f *fix) { fitUp(f); f.job.Tasks[0].NotBefore = moment(f.t, "04-06 08:00") },
		func(f *fix) { f.job.Tasks[0].NotBefore = moment(f.t, "04-06 08:01") }},
	{"R11", "taken for dry too early", coated, func(f *fix) { f.move(1, "04-06 09:00-13:59") }},
	{"R11", "dry before its finish", coated, func(f *fix) { f.move(1, "04-06 09:00-14:01") }},
	{"R11", "recoat too late", func(f *fix) {
		twoFits(f)
		f.link(f.w.Steps[0], f.w.Steps[1], 0, expand.NoMax).MaxCure = &expand.MaxCure{Last: func(t hours.Minute) hours.Minute { return t + 60 }}
	}, func(f *fix) { f.move(1, "04-06 10:01-11:01") }},
	{"R11", "moved before hard dry", func(f *fix) {
		coated(f)
		s := f.work("turn", tasks.Move, f.slip, 30, need("fitter"))
		s.Moves = "frame"
		f.put(s, "Tom", "04-06 14:00-14:30")
	}, func(f *fix) { f.move(3, "04-06 11:30-12:00") }},
	{"R11", "travels before hard dry", func(f *fix) {
		f.mate.Places = []string{"shop"}
		fitUp(f)
		f.w.Steps[0].Works = []string{"frame"}
		s := f.step(f.task("prime", tasks.Coat, f.shop, nil), "coat 1", 60, need("painter"))
		s.Works = []string{"frame"}
		s.States = []expand.State{{Name: tasks.SoftFilm, Tail: func(t hours.Minute) hours.Minute { return t + 60*1440/24 }}}
		f.put(s, "Ruaridh", "04-02 16:00-17:00")
	}, func(f *fix) {
		f.w.Steps[1].States[0].Tail = func(t hours.Minute) hours.Minute { return t + 3*1440 }
	}},
	{"R12", "hot work beside a wet film", coated, func(f *fix) { f.weldEarlier("04-06 09:30-10:30", "04-06 10:30-11:30") }},
	{"R12", "people below a load", func(f *fix) {
		lift := f.work("hang", tasks.Lift, f.deck, 60, need("fitter"))
		lift.InOneGo, lift.Lone = true, true
		f.put(lift, "Tom", "04-06 08:00-09:00")
		f.put(f.work("fit", tasks.FitUp, f.deck, 60, need("fitter")), "Ruaridh", "04-06 09:00-10:00")
	}, func(f *fix) { f.move(1, "04-06 08:59-09:59") }},
	{"R12", "a clash of the job's own", func(f *fix) {
		coated(f)
		f.put(f.work("walk", tasks.Plain, f.hinge, 30, need("fitter")), "Tom", "04-06 10:00-10:30")
	},
		func(f *fix) { f.job.Clashes = []tasks.Clash{{A: tasks.PeopleState, B: tasks.SoftFilm}} }},
	{"R12", "too many in a workface", func(f *fix) {
		f.put(f.work("a", tasks.FitUp, f.hinge, 60, need("fitter")), "Tom", "04-06 08:00-09:00")
		f.put(f.work("b", tasks.FitUp, f.hinge, 60, need("fitter")), "Ruaridh", "04-06 08:00-09:00")
	}, func(f *fix) { f.hinge.People = 1 }},
	{"R13", "no watch at the end", hot, func(f *fix) { f.p.Steps[0].Watches = f.p.Steps[0].Watches[:1] }},
	{"R13", "no watch over the night", hot, func(f *fix) { f.p.Steps[0].Watches = f.p.Steps[0].Watches[1:] }},
	{"R13", "a watch too short", hot, func(f *fix) { f.p.Steps[0].Watches[1].To -= 10 }},
	{"R13", "a watch where no piece ends", hot, func(f *fix) { f.watch(&f.p.Steps[0], "Ruaridh", "04-06 14:00-15:00") }},
	{"R13", "a watch by somebody without the ticket", func(f *fix) { hot(f); f.p.Steps[0].Watches[1].Person = "Ruaridh" },
		func(f *fix) { f.mate.Tickets = ticket("fitter") }},
	{"R13", "worked until closing time", hot, func(f *fix) {
		f.move(0, "04-06 13:00-18:00", "04-07 08:00-08:40")
		f.p.Steps[0].Watches = nil
		f.watch(&f.p.Steps[0], "Tom", "04-06 18:00-19:00", "04-07 08:40-09:40")
	}},
	{"R13", "the watcher fits something meanwhile", func(f *fix) {
		hot(f)
		f.put(f.work("fit", tasks.FitUp, f.slip, 30, need("fitter")), "Ruaridh", "04-07 10:00-10:30")
	},
		func(f *fix) { f.p.Steps[1].People[0] = "Tom" }},
	{"R14", "alone at hot work", func(f *fix) { lonely(f); f.mate.Hours = week(f.t, "daily 08:00-09:00") },
		func(f *fix) { f.mate.Hours = week(f.t, "daily 08:00-08:30") }},
	{"R14", "somebody from outside is no company", func(f *fix) { lonely(f); f.move(0, "04-06 10:00-11:00") },
		func(f *fix) { f.mate.Places, f.tom.Places = []string{"shop"}, []string{"shop"} }},
	{"R15", "more than the longest duty", func(f *fix) {
		f.pier.Open = week(f.t, "daily 06:00-22:00")
		fitUp(f)
	}, func(f *fix) { f.move(0, "04-06 17:30-18:30") }},
	{"R15", "less than the rest", func(f *fix) {
		f.pier.AlsoOpen = []tasks.Slot{slot(f.t, "04-06 18:00-22:00")}
		fitUp(f)
		f.move(0, "04-07 08:00-09:00")
		f.tom.Hours = week(f.t, "Tue 12:30-17:30", "Wed 08:00-17:00") // up to 17:30, so 8:00 is rested
	}, func(f *fix) { f.tom.Hours = week(f.t, "Tue 12:30-22:00", "Wed 08:00-17:00") }},
	{"R15", "a long way counts", func(f *fix) { fitUp(f); f.move(0, "04-05 16:00-17:00") }, func(f *fix) {
		f.job.Trips[0].Leaves = at(f.t, "04-05 04:30")
		f.job.Trips[0].Out[0].From = f.job.Trips[0].Leaves
	}},
	{"R16", "takes time though it does not happen", func(f *fix) { fitUp(f); f.w.Steps[0].Absent = true; f.p.Steps[0] = zero(f, 0) },
		func(f *fix) { f.p.Steps[0].Finish++ }},
	{"R16", "out of order through what does not happen", func(f *fix) {
		twoFits(f)
		f.w.Steps[1].Absent = true
		f.p.Steps[1] = zero(f, 1)
		f.p.Steps[1].Start, f.p.Steps[1].Finish = at(f.t, "04-06 09:00"), at(f.t, "04-06 09:00")
		f.link(f.w.Steps[0], f.w.Steps[1], 600, 10) // neither wait counts
	}, func(f *fix) { f.p.Steps[1].Start--; f.p.Steps[1].Finish-- }},
	{"R17", "no order holds", func(f *fix) {
		twoFits(f)
		a, b := f.w.Steps[:1], f.w.Steps[1:2]
		f.w.Orders = []expand.Order{{Choices: []expand.Before{{First: b, Then: a}, {First: a, Then: b}}, Text: "one before the other"}}
	}, func(f *fix) { f.move(1, "04-06 08:59-09:59") }},
	{"R18", "a task's deadline", func(f *fix) { fitUp(f); f.job.Tasks[0].Deadline = moment(f.t, "04-06 09:00") },
		func(f *fix) { f.job.Tasks[0].Deadline = moment(f.t, "04-06 08:59") }},
	{"R18", "a deadline of the work", func(f *fix) {
		fitUp(f)
		f.w.Deadlines = []expand.Deadline{{Step: f.w.Steps[0], By: at(f.t, "04-06 09:00")}}
	}, func(f *fix) { f.w.Deadlines[0].By-- }},
	{"R23", "the hire has ended", func(f *fix) {
		fitUp(f)
		f.job.Kit = []*tasks.Kit{{Name: "crane", At: f.pier, Count: 1, Slots: []tasks.Slot{slot(f.t, "04-06 07:00-09:00")}}}
		f.w.Steps[0].Kit = []expand.Use{{Kit: f.job.Kit[0], Count: 1}}
	}, func(f *fix) { f.job.Kit[0].Slots = []tasks.Slot{slot(f.t, "04-06 07:00-08:45")} }},
	{"R23", "before the permit is issued", func(f *fix) {
		lonely(f)
		f.pier.Permits = []tasks.Permit{{Name: "hot work permit", For: tasks.HotWorkState, Valid: week(f.t, "daily 07:30-18:00"), Issue: tasks.Amount{Value: 30}}}
	}, func(f *fix) { f.pier.Permits[0].Issue.Value = 45 }},
}

func hot(f *fix) { f.weldAtHinge() }

// lonely is an hour of hot work by Ines alone, others about; her own watch follows.
func lonely(f *fix) {
	f.tom.Places = []string{"shop"}
	s := f.work("cut", tasks.Cut, f.deck, 60, need("weld"))
	s.Hot, s.Lone = true, true
	f.pier.FireWatch = tasks.Amount{Value: 0, Pos: tasks.Pos{Line: 7}} // none
	f.put(s, "Ines", "04-06 08:00-09:00")
}

// relieved is six hours that Tom begins and Ruaridh goes on with after Tom's day, then Tom again.
func relieved(f *fix) {
	f.tom.Hours = week(f.t, "daily 08:00-12:00")
	s := f.work("drill", tasks.Plain, f.deck, 390, need("fitter"))
	s.ChangeHands = true
	p := f.put(s, "Tom", "04-06 10:00-12:00", "04-06 12:30-16:00", "04-07 08:00-09:00")
	f.mate.Hours = week(f.t, "daily 12:30-16:00")
	p.Relief, p.Shifts = []string{"Ruaridh"}, []int{0, 1, 0}
}

// zero gives a plan row of no time for step i.
func zero(f *fix, i int) plan.Step {
	s := f.w.Steps[i]
	return plan.Step{Task: s.Task.Name, Step: s.Name, Start: at(f.t, "04-06 08:00"), Finish: at(f.t, "04-06 08:00")}
}

// weldEarlier moves the weld of coated with its watch.
func (f *fix) weldEarlier(piece, watch string) {
	f.move(2, piece)
	f.p.Steps[2].Watches[0].Span = span(f.t, watch)
}
