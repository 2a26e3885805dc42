"""What all tests share: how many examples the generated ones try, and that only test_*.py is read for tests.

FARSIDE_EXAMPLES is quick, usual or many.
"""

import os
import sys
from pathlib import Path

import pytest
from hypothesis import HealthCheck, settings

for name, count in {"quick": 15, "usual": 100, "many": 2000}.items():
    settings.register_profile(
        name, max_examples=count, deadline=None, derandomize=True, suppress_health_check=[HealthCheck.too_slow]
    )
settings.load_profile(os.environ.get("FARSIDE_EXAMPLES", "usual"))


def pytest_collection_modifyitems(items: list[pytest.Item]) -> None:
    """In Pyodide, skips what is marked as impossible there; the tally names each."""
    if sys.platform == "emscripten":
        for item in items:
            if "outside_browser" in item.keywords:
                item.add_marker(pytest.mark.skip(reason="cannot be tried on the browser's Python"))


def pytest_ignore_collect(collection_path: Path) -> bool | None:
    """Keeps doctest from importing what stands beside the tests: generators, servers, benchmarks."""
    beside = collection_path.suffix == ".py" and not collection_path.name.startswith(("test_", "conftest"))
    return True if beside else None
