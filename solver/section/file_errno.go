package section

import (
	"errors"
	"syscall"
)

func isFull(err error) bool {
	return errors.Is(err, syscall.ENOSPC) || errors.Is(err, errQuota)
}

func isReadOnly(err error) bool { return errors.Is(err, syscall.EROFS) }
