# Two commands set everything up on a fresh machine:
#   make demo   runs the main job on the sample bids, reports in reports/
#   make test   lint, types and tests
PYTHON ?= python3
VENV := .venv
BIN := $(VENV)/bin
export DEBIAN_FRONTEND = noninteractive

# Pango draws the PDF; the rest opens and checks what the tests produce.
PANGO := libpango-1.0-0 libpangoft2-1.0-0 libharfbuzz-subset0 fonts-dejavu-core
SYSTEM := $(PANGO) chromium poppler-utils qpdf libreoffice-calc-nogui

.PHONY: demo test system pango browser benchmarks clean

demo: pango $(VENV)/installed
	$(BIN)/speccheck check sample_specs --out reports || test $$? -eq 1

test: pango browser $(VENV)/installed-test
	$(BIN)/ruff check .
	$(BIN)/ruff format --check .
	$(BIN)/mypy
	$(BIN)/pytest

benchmarks: $(VENV)/installed-test
	for file in tests/benchmarks/[a-z]*.py; do $(BIN)/python $$file || exit 1; done

$(VENV)/installed: pyproject.toml
	$(PYTHON) -m venv $(VENV)
	$(BIN)/pip install --quiet -e .
	$(BIN)/python -m compileall -q speccheck
	touch $@

$(VENV)/installed-test: pyproject.toml
	$(PYTHON) -m venv $(VENV)
	$(BIN)/pip install --quiet -e '.[test]'
	$(BIN)/pip install --quiet --only-binary :all: PyNEC \
		|| echo "no full-wave solver library for this machine: its tests are skipped, its published figures hold"
	$(BIN)/python -m compileall -q speccheck
	touch $@

# PDF needs Pango from the system; without root the program still writes HTML and says what to install.
pango:
	@ldconfig -p | grep -q libpangoft2-1.0 || \
	if [ "$$(id -u)" = 0 ] && command -v apt-get >/dev/null; then \
		apt-get update -qq && apt-get install -y -qq --no-install-recommends $(PANGO) >/dev/null; \
	else echo "Pango is not installed: no PDF until you install $(PANGO)"; fi

# The accessibility rules that the browser tests run; without npm or a registry those tests are skipped.
browser:
	@if [ ! -d tests/browser/node_modules ] && command -v npm >/dev/null; then \
		npm install --prefix tests/browser --no-audit --no-fund --loglevel=error \
		|| echo "the accessibility rules could not be fetched: their test is skipped"; \
	fi

system:
	apt-get update -qq
	apt-get install -y -qq --no-install-recommends $(SYSTEM) >/dev/null
	@command -v npm >/dev/null || apt-get install -y -qq --no-install-recommends npm >/dev/null \
		|| echo "npm could not be installed: the accessibility rules are skipped"

clean:
	rm -rf $(VENV) dist reports .pytest_cache .mypy_cache .ruff_cache .hypothesis
