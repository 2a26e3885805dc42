"""What the clinic's readers say of a file that is well formed and cannot be meant: key to English."""

from collections.abc import Mapping
from typing import Final

MESSAGES: Final[Mapping[str, str]] = {
    "kind-missing": "the file does not say its kind; begin it with one, such as kind: plan; the kinds are {kinds}",
    "kind-unknown-near": '"{found}" is no kind of file that is read here; did you mean "{near}"?',
    "kind-unknown": "{found} is no kind of file that is read here; the kinds are {kinds}",
    "kind-not-opened": "a {found} cannot be opened here; what can is {kinds}",
    "one-at-a-time": "a second {kind} among the files; open one {kind} at a time, with as many cards as it needs",
    "kind-other": "this is a {found}; a {wanted} is needed here",
    "missing-after-usual": 'missing key "{what}": neither the plan nor the clinic\'s usual values give it',
    "card-unknown": 'no {kind} card has the id "{id}"; those at hand are {known}',
    "card-unknown-near": 'no {kind} card has the id "{id}"; did you mean "{near}"?',
    "card-none": 'no {kind} card has the id "{id}"; none is at hand',
    "card-twice": 'two {kind} cards have the id "{id}": the other is {other}',
    "mode-unknown": 'lamp "{lamp}" has no mode "{mode}"; it has {known}',
    "mode-twice": 'two modes are called "{mode}"',
    "share-sum": "the shares of a mode's bands add up to {sum}; they must add up to 1, within 0.02",
    "beam-readings": "no beam gives these readings: the farthest from the tip must be lower than the nearest",
    "initiators-absorb-more": (
        "the initiators alone absorb {initiators} /mm at {at_nm} nm, more than the measured total of {total} /mm"
    ),
    "transmittance-impossible": "no paste lets {share} of the light through {at_mm} mm with this scattering",
    "initiator-unknown": 'no initiator is called "{what}"; those known are {known}',
    "thicker-than-cavity": (
        "{what} is {thickness}; the cavity is {depth} mm deep, so it must be above 0 and at most {depth}"
    ),
    "fills-past-tip": "the increments reach {filled} mm up from the floor, past the lamp's tip at {tip} mm",
    "side-distance": "an exposure from the side needs its own tip_distance_mm",
    "light-unknown": 'no light of a room is called "{what}"; those known are {known}',
    "light-unknown-near": 'no light of a room is called "{what}"; did you mean "{near}"?',
}
