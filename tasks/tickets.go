package tasks

// Tickets that the kinds of tasks ask for by themselves.
const (
	WeldTicket      = "weld"
	FireWatchTicket = "fire watch"
	SlingerTicket   = "slinger/signaller"
)
