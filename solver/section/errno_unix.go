//go:build unix

package section

import "syscall"

var errQuota error = syscall.EDQUOT
