# Two commands from nothing: `make demo` and `make test`. Both set up what they need first.
SETUP_INPUTS := pyproject.toml .ci/setup $(wildcard hatch_build.py package.json package-lock.json)

.PHONY: help demo test selftest pictures clean
help:
	@echo "make demo      check and build the demo region, serve the app, booklet and desk here"
	@echo "make test      run every test"
	@echo "make selftest  lint, types, tests, two builds compared"
	@echo "make pictures  take the pictures of the docs anew from the built demo"
	@echo "make clean     remove what was built; tables and records stay"

demo: .venv/.ready-demo
	@exec .venv/bin/beltbook desk --demo

# Small matrices: threads that wait for each other cost more than they bring.
test: export OMP_NUM_THREADS = 1
test: .venv/.ready-test
	@exec .venv/bin/python -m pytest

selftest: .venv/.ready-test
	.venv/bin/ruff check .
	.venv/bin/mypy
	.venv/bin/beltbook check $(wildcard keydata/*)
	.venv/bin/python -m pytest
	@one=$$(mktemp -d) && two=$$(mktemp -d) \
	  && .venv/bin/beltbook build $(wildcard keydata/*) --out "$$one/site" >/dev/null \
	  && .venv/bin/beltbook build $(wildcard keydata/*) --out "$$two/site" >/dev/null \
	  && diff -r "$$one/site" "$$two/site" && echo "two builds, the same bytes" \
	  && rm -r "$$one" "$$two"

pictures: .venv/.ready-test
	@.venv/bin/python .ci/pictures

clean:
	find site_out -mindepth 1 -not -name README.md -delete

.venv/.ready-%: $(SETUP_INPUTS)
	@.ci/setup $*
