"""Data as a YAML file that people can edit and that reads back as the same data."""

from collections.abc import Mapping
from functools import cache
from typing import Any, Final

from farside.reading.scalars import NotFinite, TooLong, resolved

_WIDTH: Final = 100


def as_yaml(data: Mapping[str, Any]) -> str:
    """A plan or a card as its file, keys in the order given.

    Text that the reader would take for a number or an answer, such as a title of `1e-3`, is quoted.
    """
    import yaml  # slow to import, and the page saves nothing to start

    return yaml.dump(data, Dumper=_dumper(), sort_keys=False, allow_unicode=True, width=_WIDTH)


@cache
def _dumper() -> Any:
    import yaml

    class Dumper(yaml.SafeDumper):
        def ignore_aliases(self, data: Any) -> bool:  # noqa: ARG002 - what is meant twice is written twice
            return True

    def text(dumper: Any, value: str) -> Any:
        return dumper.represent_scalar("tag:yaml.org,2002:str", value, style="'" if _taken_otherwise(value) else None)

    Dumper.add_representer(str, text)
    return Dumper


def _taken_otherwise(text: str) -> bool:
    try:
        return not isinstance(resolved(text), str)
    except (NotFinite, TooLong):
        return True
