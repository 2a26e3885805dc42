"""What the engine says of its own findings, beside what the rules say: key to English."""

from collections.abc import Mapping
from typing import Final

MESSAGES: Final[Mapping[str, str]] = {
    "open-missing": "Not judged: {missing}.",
    "open-missing-do": "Enter it, and the rule answers.",
    "input-missing": "{input} is missing",
    "beyond-reach": "{input}, the range over which the model was checked",
    "verdict-stop-increment": "Do not expose increment {number} yet",
    "verdict-stop": "Do not expose yet",
    "verdict-revise": "Change this plan before exposing",
    "verdict-open": "Not judged to the end: something is missing",
    "verdict-watch": "Go on, knowing what follows",
    "verdict-clear": "Clear by these rules and these inputs",
    "clear-count": "{count} other checks, by these rules and these inputs.",
    "clear-count-all": "{count} checks, by these rules and these inputs.",
    "caution": (
        "A planning aid. The maker's instructions, local rules and the licensed clinician's judgement come first. "
        "Clear never means that it has set."
    ),
    "rule-name-unknown": 'a condition uses "{name}", which is no quantity or field of {about}',
    "rule-name-near": 'a condition uses "{name}", which is no quantity of {about}; did you mean "{near}"?',
    "rule-limit-unknown": 'a condition uses the limit "{name}", which the rule does not have',
    "rule-word-unknown": 'the words use "{{{name}}}", which is no quantity, limit or field here',
    "rule-levels-order": "levels run from the worst finding down; {later} stands below {earlier}",
}

INPUTS: Final[Mapping[str, str]] = {
    "lamp.readings": "a reading of the lamp's output in this mode",
    "lamp.beam": "the lamp's beam",
    "lamp.modes": "the seconds that the lamp's timer offers",
    "lamp.stated_exitance_mw_cm2": "the maker's stated output of the lamp",
    "lamp.tip.checked_on": "the day the lamp's tip was last looked at",
    "composite.optics": "how the composite passes light",
    "composite.initiators": "the composite's initiators",
    "composite.initiators_known": "the composite's initiators",
    "composite.resin_weight_share": "the composite's resin share",
    "composite.maker_instructions": "a complete row of the maker's instructions (irradiance, seconds, thickness)",
    "composite.ambient": "the composite's ambient light figure",
    "composite.expires": "the composite's expiry date",
    "adhesive.maker_instructions": "the adhesive's maker's instructions",
    "liner.maker_instructions": "the liner's maker's instructions",
    "plan.adhesive": "the adhesive",
    "plan.liner": "the liner",
    "plan.cavity.remaining_dentine_mm": "the remaining dentine",
    "plan.cavity.soft_tissue_mm": "the distance to soft tissue",
    "plan.room.sources": "the room's light",
    "plan.team.exposures_today_count": "the number of exposures today",
    "plan.team.filters_for": "who wears an eye filter",
    "plan.team.filter_transmittance_share": "what the eye filter lets through",
    "plan.team.light_sensitive": "whether someone here is light-sensitive",
    "plan.team.eye_condition": "whether someone here has an eye condition",
    "increment.placing_s": "the placing time",
    "increment.dispensed_s": "the time since dispensing",
    "increment.undercut_mm": "the depth of undercut",
    "increment.composite_temperature_c": "the composite's temperature",
    "increment.through": "what passes the overlay",
    "exposure.through": "what passes the overlay",
    "plan.site": "whether the tooth is anterior or posterior",
    "plan.matrix": "the matrix",
}
