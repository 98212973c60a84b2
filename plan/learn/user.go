package learn

// A user is an activity as a resource sees it: it holds amount from its start to its finish.
type user struct {
	start  side
	finish side  // the finish is the lower side of this, plus length
	length int32 // where finish is start: the fixed length; else 0
	amount int32
	least  int32 // it takes as long as this at least
}

func (e *engine) latestStart(u *user) int32    { return -e.now[u.start^1] }
func (e *engine) earliestFinish(u *user) int32 { return e.now[u.finish] + u.length }
func (e *engine) latestFinish(u *user) int32   { return u.length - e.now[u.finish^1] }

// startBy and finishFrom are the facts that the user starts at t or before, and that it finishes
// at t or later.
func (u *user) startBy(t int32) fact    { return fact{u.start ^ 1, -t} }
func (u *user) finishFrom(t int32) fact { return fact{u.finish, t - u.length} }
func (u *user) finishBy(t int32) fact   { return fact{u.finish ^ 1, u.length - t} }
