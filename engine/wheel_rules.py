"""Puts rules/ into the wheel as farside/rules; an editable install reads the checkout's own."""

from pathlib import Path
from typing import Any

from hatchling.builders.hooks.plugin.interface import BuildHookInterface


class WheelRules(BuildHookInterface):
    """Hatchling's hook: the rules travel in a standard wheel, and no stale copy is left in a checkout."""

    def initialize(self, version: str, build_data: dict[str, Any]) -> None:
        if version == "standard":
            build_data["force_include"][str(Path(self.root, "rules"))] = "farside/rules"
