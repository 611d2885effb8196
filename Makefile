# Packrise. `make run` opens the window, `make test` checks the engine; each does its own set-up.
SHELL := bash
export PREFIX DESTDIR
NODISPLAY := ./assets/... ./solver/... ./render/... ./ui/... ./cmd/packrise-cli/...

.PHONY: run build cli test race lint e2e soak validate bench package install uninstall package-test clean

run: build ## open the window on a demo design (FILE=… for another)
	@bin/packrise $(FILE)

build:
	@.ci/setup go window
	go build -o bin/packrise ./cmd/packrise

cli: ## the command line alone: no C compiler, no display
	@.ci/setup go
	CGO_ENABLED=0 go build -o bin/packrise-cli ./cmd/packrise-cli

test: ## no display, no C compiler, no OpenGL
	@.ci/setup go
	CGO_ENABLED=0 go test $(NODISPLAY)

race: ## what runs side by side under the race detector, shortened
	@.ci/setup go race
	CGO_ENABLED=1 go test -race -short ./assets/... ./solver/... ./render/... ./ui/keep ./ui/latest
	CGO_ENABLED=1 go test -race -short ./ui -run 'Desk|Advice|Drag|Frame|Words|Rated|Recover|Closing'

lint:
	@.ci/setup go window
	@bad=$$(go tool gofumpt -l .); if [ -n "$$bad" ]; then echo "not formatted (go tool gofumpt -w .):"; echo "$$bad"; exit 1; fi
	go vet ./...
	go tool staticcheck ./...

e2e: build cli ## the real window under a display without a screen
	@.ci/setup look
	bash .ci/e2e.sh
	bash .ci/keep.sh

soak: ## long runs: more random sections, fuzzing; by hand
	@.ci/setup go
	CGO_ENABLED=0 PACKRISE_SOAK=1 go test -timeout 60m $(NODISPLAY)
	CGO_ENABLED=0 go test ./solver/section -run '^$$' -fuzz FuzzRead -fuzztime 5m

validate: ## computed against published ratings: writes testdata/validation and prints its summary
	@.ci/setup go
	CGO_ENABLED=0 PACKRISE_VALIDATE=1 go test ./solver/rating -count=1 -run Validation
	CGO_ENABLED=0 PACKRISE_VALIDATE=1 go test ./solver/study -count=1 -timeout 60m -run 'Published|Scenario'
	@grep '^|' testdata/validation/table.md | sed '/^| case/,$$d'

bench: ## speed, with allocations
	@.ci/setup go
	CGO_ENABLED=0 go test -run '^$$' -bench . -benchmem $(NODISPLAY)

package: build cli ## out/packrise-VERSION-linux-ARCH.tar.gz, which runs on a plain Debian
	@bash .ci/packaging/package.sh

package-test: package ## unpack it elsewhere, install, run, take away
	@bash .ci/package.sh

install: package ## into PREFIX (~/.local, as root /usr/local); DESTDIR is put before it
	@sh out/package/packrise-*/install.sh

uninstall: ## takes it away again, PREFIX as for install
	@sh .ci/packaging/install.sh --uninstall

clean:
	rm -rf bin out
