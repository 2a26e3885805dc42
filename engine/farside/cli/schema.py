"""`farside schema`: the JSON Schema of a kind of file, for editors and other programs."""

import argparse
import json
from typing import TYPE_CHECKING

from farside import shipped

if TYPE_CHECKING:
    Commands = argparse._SubParsersAction[argparse.ArgumentParser]


def add_to(commands: "Commands") -> None:
    """Add the subcommand to a parser."""
    kinds = tuple(name.rpartition("/")[2].removesuffix(".json") for name in shipped.names("schema"))
    parser = commands.add_parser(
        "schema", help="print a file format's JSON Schema", description="Print a file format's JSON Schema."
    )
    parser.add_argument("kind", nargs="?", choices=kinds, help="the kind of file; without it the kinds are listed")
    parser.set_defaults(run=run, kinds=kinds)


def run(called: argparse.Namespace) -> int:
    """Print the schema, or the kinds that there are."""
    if called.kind is None:
        print("\n".join(called.kinds))
    else:
        print(json.dumps(shipped.document(f"schema/v1/{called.kind}.json").data, ensure_ascii=False, indent=2))
    return 0
