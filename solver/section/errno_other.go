//go:build !unix

package section

import "errors"

var errQuota = errors.New("quota exceeded")
