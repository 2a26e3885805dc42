"""How long one check of a four-increment plan takes in CPython: first, and with the tables of earlier checks kept.

    python tests/bench/check.py [--rounds 9]

Beside the whole check, as the page asks for it (JSON in, JSON out), stands its light alone, and the same light by a
vectorised NumPy version of the same model, which keeps nothing. They run in turn, and what is counted is the
processor's time: on a busy machine it is steadier than the clock's.
"""

import argparse
import json
import statistics
import sys
import time
from collections.abc import Callable
from functools import _lru_cache_wrapper, partial
from pathlib import Path

TOP = Path(__file__).resolve().parents[2]
sys.path[:0] = [str(TOP / "engine"), str(TOP / "tests")]

from bench.four_increments import four_increments, plan_of, request
from bench.light_numpy import plan_doses
from farside import bridge
from farside.trace.light import trace_light


def empty_kept() -> None:
    """Empties whatever the engine keeps of plans and cards, its bounded caches; what ships stays parsed."""
    for name, module in list(sys.modules.items()):
        if name.partition(".")[0] == "farside":
            for kept in vars(module).values():
                if isinstance(kept, _lru_cache_wrapper) and kept.cache_parameters()["maxsize"] is not None:
                    kept.cache_clear()


def milliseconds(timed: Callable[[], object], clock: Callable[[], float]) -> float:
    start = clock()
    timed()
    return (clock() - start) * 1e3


def changed_mm(number: int) -> float:
    """A thickness that no earlier round had."""
    return 1.5 - 0.01 * (number + 1)


def asked(first_mm: float = 1.5) -> str:
    return json.dumps(request(four_increments(first_mm)))


def answered(text: str) -> None:
    assert json.loads(bridge.call(text))["ok"]


def main() -> int:
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--rounds", type=int, default=9)
    rounds = parser.parse_args().rounds
    plan, text = plan_of(four_increments()), asked()
    answered(text)  # imports what is only imported when needed, parses what ships
    plan_doses(plan)

    times: dict[str, list[float]] = {}
    for number in range(rounds):
        changed = changed_mm(number)
        changed_plan, changed_text = plan_of(four_increments(changed)), asked(changed)
        turns: dict[str, Callable[[], object]] = {
            "check, first": partial(answered, text),
            "check, a thickness changed": partial(answered, changed_text),
            "check, nothing changed": partial(answered, changed_text),
            "NumPy light, nothing kept": partial(plan_doses, plan),
            "light, first": partial(trace_light, plan),
            "light, a thickness changed": partial(trace_light, changed_plan),
            "light, nothing changed": partial(trace_light, changed_plan),
        }
        for name, turn in turns.items():
            if name.endswith("first"):
                empty_kept()
            times.setdefault(name, []).append(milliseconds(turn, time.process_time))

    middle = {name: statistics.median(own) for name, own in times.items()}
    print(f"Four increments in CPython {sys.version.split()[0]}: milliseconds of the processor,")
    print(f"median of {rounds} (least to most)")
    for name, own in times.items():
        over = middle[name] / middle["NumPy light, nothing kept"]
        print(f"  {name:27} {middle[name]:7.1f}  ({min(own):.1f} to {max(own):.1f})  {over:6.2f} of NumPy")
    return 0


if __name__ == "__main__":
    sys.exit(main())
