"""What the reader says when a file cannot be read: one template for each kind of problem.

A template's fields are the values of its problem; text among them is cut and made printable before it is put in.
"""

from collections.abc import Mapping
from types import MappingProxyType
from typing import Final

MESSAGES: Final[Mapping[str, str]] = MappingProxyType(
    {
        # the file as bytes and characters
        "too-large": "the file holds {size} bytes; at most {most} are read",
        "too-large-yaml": "the file holds {size} characters; at most {most} are read of YAML, more of JSON",
        "not-utf-8": "the file is not text in UTF-8 (byte {byte} cannot be read here); save it as UTF-8",
        "utf-16": "the file is saved as UTF-16 or UTF-32; save it as UTF-8",
        "character": "the character {character} cannot stand in a file; remove it",
        "character-in-text": "{where} holds the character {character}, which cannot stand in a text; remove it",
        "half-character": "{where} holds half a character ({character}); write the whole character",
        # the file as YAML or JSON
        "empty": "the file is empty; it needs keys and values, beginning with its kind",
        "top-not-mapping": "the file holds {found}; it must hold keys and values, such as kind: plan",
        "several-documents": "a second document begins here (---); one file holds one",
        "quote-not-closed": "the quote that opens here is never closed; the file ends inside it",
        "quote-over-lines": "the quote that opens here is not closed on its line",
        "bracket-not-closed": "the {bracket} that opens here is never closed; the file ends inside it",
        "comma-missing": "a comma or the closing {bracket} is missing here, for the list or mapping of line {opened}",
        "colon-missing": "a colon, and a space after it, is missing after this key",
        "stray-colon": "a colon cannot stand here; check the indentation, or put text that holds a colon in quotes",
        "indentation": "this line does not fit the ones before it; check its indentation, dashes and quotes",
        "dash": "a dash for a list entry cannot stand here; check its indentation",
        "tab": "a tab stands where spaces are needed; replace it with spaces",
        "needs-quotes": "text that begins with {character} must stand in quotes",
        "bad-escape": "the backslash and what follows it mean nothing here; write two backslashes for one",
        "ends-early": "the file ends here before it is complete",
        "key-in-quotes": (
            "a key in double quotes is needed here; "
            "JSON takes no single quotes, no comments, and no comma after the last entry"
        ),
        "value-expected": "a value is needed here: text in double quotes, a number such as 0.5, true, false or null",
        "after-the-end": "nothing may follow after the end of the file's contents",
        "syntax": "this is not valid YAML; check the indentation, colons and quotes here and on the line before",
        "directives": "{count} lines begin with %; a file needs none, and at most {most} are read",
        "tag": "a tag ({tag}) cannot stand in a file; remove it",
        "too-deep": "lists and mappings stand too deep in one another here; at most {most} levels are read",
        "too-many": "the file holds too many keys and values, aliases counted in full; at most {most} are read",
        "alias-unknown": "the alias *{name} stands for nothing; no &{name} comes before it",
        "alias-inside-itself": "the alias *{name} stands inside what it stands for",
        "duplicate-key": 'the key "{name}" stands twice in {where}, first in line {first}',
        "key-not-text": "the key {name} is {found}; a key is text, so put it in quotes",
        "not-finite": "{where} is {value}, a non-finite number; give a finite one",
        "number-too-long": "{where} is a number of {digits} characters; at most {most} are read",
        "not-data": "{where} is of type {found}, which no file can hold",
        "decimal-comma": "a comma ends the number before it; write {written}, with a point",
        "key-not-plain": "{found} stands as a key in {where}; a key is text",
        # the file against its schema
        "unknown-key": 'unknown key "{name}" in {where}',
        "unknown-key-near": 'unknown key "{name}" in {where}; did you mean "{near}"?',
        "merge-key": "{where} holds the merge key <<, which is not read; write out the keys that it stands for",
        "unknown-key-of": 'unknown key "{name}" in {where}; it may hold {known}',
        "key-form": 'the key "{name}" in {where} does not fit; a key here is {form}',
        "not-together": '"{name}" and "{other}" cannot stand together in {where}; give one of them',
        "missing": '"{name}" is missing from {where}',
        "missing-either": "{where} needs {names}",
        "range": "{where} is {value}; it must be {range}",
        "type": "{where} is {found}; {wanted} is needed",
        "type-word": '{where} is "{value}", which is text; {wanted} is needed',
        "type-spaces": '{where} is "{value}", which is text; {wanted} is needed: write {number}, without spaces',
        "type-comma": '{where} is text; {wanted} is needed: write {number}, with a point, for "{value}"',
        "type-unit": '{where} is text; {wanted} is needed: write {number} alone for "{value}", the unit is in the key',
        "type-quotes": "{where} is text; {wanted} is needed: write {number} without quotes",
        "type-answer": "{where} is text; {wanted} is needed: write {written}",
        "type-text": "{where} is {found}; text is needed, so put it in quotes",
        "choice": '{where} is "{value}"; it must be {choices}',
        "choice-near": '{where} is "{value}"; it must be {choices}; did you mean "{near}"?',
        "choice-type": "{where} is {found}; it must be {choices}",
        "form": '{where} is "{value}"; it must be {form}',
        "no-such-day": '{where} is "{value}"; there is no such day, a date is written YYYY-MM-DD',
        "text-long": "{where} is too long ({length} characters); the most is {most}",
        "text-short": "{where} is too short ({length} characters); the least is {least}",
        "list-long": "{where} has too many entries ({length}); the most is {most}",
        "list-short": "{where} has too few entries ({length}); the least is {least}",
        "list-twice": "{where} lists an entry twice",
        "keys-many": "{where} has too many keys ({length}); the most is {most}",
        "keys-few": "{where} has too few keys ({length}); the least is {least}",
        "not-allowed": "{where} cannot stand here",
        "unfit": "{where} does not fit what is expected here",
    }
)
