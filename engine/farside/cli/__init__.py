"""The command `farside`: one file a subcommand."""

import argparse
import sys
from collections.abc import Sequence
from typing import Final

from farside.cli import check, rules, schema
from farside.reading.problems import Refused
from farside.version import VERSION

WRONG: Final = 2


def main(arguments: Sequence[str] | None = None) -> int:
    """Run the command line; what is wrong with the call or its input goes to standard error and gives 2."""
    parser = argparse.ArgumentParser(
        prog="farside",
        description="Checks whether each increment of a light-cured filling gets its light.",
        epilog="A planning aid: the maker's instructions, local rules and the licensed clinician come first.",
    )
    parser.add_argument("--version", action="version", version=f"farside {VERSION}")
    commands = parser.add_subparsers(required=True, metavar="COMMAND")
    for command in (check, rules, schema):
        command.add_to(commands)
    called = parser.parse_args(arguments)
    try:
        status: int = called.run(called)
    except BrokenPipeError:
        return WRONG
    except Refused as refused:
        print(refused, file=sys.stderr)
        return WRONG
    except OSError as unreadable:
        print(f"cannot read {unreadable.filename}: {unreadable.strerror}", file=sys.stderr)
        return WRONG
    return status
