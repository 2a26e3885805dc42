"""`farside rules`: the rules of the protocol, or one of them whole."""

import argparse
import json
import sys
from typing import TYPE_CHECKING

from farside.protocol.protocol import Protocol, base_protocol
from farside.protocol.rule import Rule

if TYPE_CHECKING:
    Commands = argparse._SubParsersAction[argparse.ArgumentParser]


def add_to(commands: "Commands") -> None:
    """Add the subcommand to a parser."""
    parser = commands.add_parser(
        "rules", help="list the rules, or show one", description="List the rules, or show one."
    )
    parser.add_argument("rule", nargs="?", help="the id of one rule")
    parser.add_argument("--format", choices=("text", "json"), default="text", help="how they are printed")
    parser.set_defaults(run=run)


def run(called: argparse.Namespace) -> int:
    """Print the rules."""
    protocol = base_protocol()
    rules = [rule for rule in protocol.rules if called.rule in {None, rule.id}]
    if not rules:
        print(f'no rule has the id "{called.rule}"; "farside rules" lists them', file=sys.stderr)
        return 2
    if called.format == "json":
        print(json.dumps([dict(rule.data) for rule in rules], ensure_ascii=False, indent=2))
    elif called.rule is None:
        print("\n".join(_listed(protocol)))
    else:
        print("\n".join(_shown(rules[0])))
    return 0


def _listed(protocol: Protocol) -> list[str]:
    width = max(len(rule.id) for rule in protocol.rules)
    lines = [f"Protocol {protocol.id} {protocol.edition} ({protocol.digest[:8]}): {len(protocol.rules)} rules"]
    for topic in dict.fromkeys(sorted(rule.topic for rule in protocol.rules)):
        lines += ["", topic]
        lines += [f"  {rule.id:<{width}}  {rule.title}" for rule in protocol.rules if rule.topic == topic]
    return lines


def _shown(rule: Rule) -> list[str]:
    lines = [f"{rule.id} · {rule.topic} · about each {rule.about}", rule.title, "", rule.data["why"], ""]
    for limit in rule.limits.values():
        cited = ", ".join(source["cite"] for source in limit.sources)
        rests = cited or ("common practice, no source" if limit.strength == "common-practice" else limit.strength)
        lines.append(
            f"  {limit.name} = {limit.value} ({limit.strength}{': ' + cited if cited else ''}) {limit.why or rests}"
        )
    return [*lines, *(["", f"Caution: {rule.caution}"] if rule.caution else [])]
