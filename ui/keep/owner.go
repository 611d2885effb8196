package keep

import (
	"os"
	"sync"
	"time"
)

// quiet is how long the other machine may give no sign of life before its note or side file counts as left behind.
const quiet = 5 * time.Minute

// Owner is one run of the program.
type Owner struct {
	PID   int    `json:"pid"`
	Host  string `json:"host"`
	Begun string `json:"begun"` // when the process began, as the system counts it: numbers of processes are used again
}

// Me returns this run of the program.
var Me = sync.OnceValue(func() Owner {
	host, err := os.Hostname()
	if err != nil {
		host = "unknown"
	}
	return Owner{PID: os.Getpid(), Host: host, Begun: begun(os.Getpid())}
})

// lives tells whether the owner still runs: on this machine by its process, on another by how old its last sign of life is.
func (o Owner) lives(sign, now time.Time) bool {
	if o.PID <= 0 {
		return false
	}
	if o.Host != Me().Host {
		return now.Sub(sign) < quiet
	}
	return alive(o.PID) && begun(o.PID) == o.Begun
}
