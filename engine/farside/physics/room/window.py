"""How long a paste may be handled under a room's light."""

import math


def working_window_s(
    tested_lx: float, tested_s: float, test_weight: float, sources: tuple[tuple[float, float], ...]
) -> float:
    """Seconds of handling that give the paste the light which it stood in its test.

    Parameters
    ----------
    tested_lx : float
        Illuminance of the test. [lx]
    tested_s : float
        Seconds that the paste stayed homogeneous under it. [s]
    test_weight : float
        What the test's light is worth to the initiator per 1 000 lx. [mW/cm²]
    sources : tuple of (float, float)
        The room's lights: illuminance and weight of each. [lx, mW/cm² per 1 000 lx]

    Returns
    -------
    float
        Seconds; infinite in the dark. [s]

    Examples
    --------
    >>> working_window_s(8000.0, 60.0, 0.0942, ((16000.0, 0.0942),))
    30.0

    References
    ----------
    Lane, Watts, Wilson, Dent Mater 1998;14:353-7: illuminance times working time is constant.
    """
    room = room_weighted_mw_cm2(sources)
    return room_weighted_mw_cm2(((tested_lx, test_weight),)) * tested_s / room if room > 0.0 else math.inf


def room_weighted_mw_cm2(sources: tuple[tuple[float, float], ...]) -> float:
    """Irradiance of a room's lights as the initiator counts it; several lights add.

    Parameters
    ----------
    sources : tuple of (float, float)
        Illuminance and weight of each light. [lx, mW/cm² per 1 000 lx]

    Examples
    --------
    >>> round(room_weighted_mw_cm2(((12000.0, 0.0526), (1000.0, 0.0942))), 4)
    0.7254
    """
    return math.fsum(illuminance_lx / 1000.0 * weight for illuminance_lx, weight in sources)
