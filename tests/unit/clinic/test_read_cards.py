"""Cards as records: modes, beam, maker's rows, initiators and optics, each with where it came from."""

import pytest
from farside.clinic.lamp import Band
from farside.clinic.materials import MakerRow, chosen_row
from farside.clinic.optics import known_initiators
from farside.clinic.provenance import BEST_FIRST, worst
from farside.clinic.read_cards import read_composite, read_lamp, read_layer
from farside.physics.light.beam import on_axis_share
from farside.physics.light.paste import absorption_at
from farside.physics.light.transport import slab
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from unit.made import ADHESIVE, COMPOSITE, LAMP, edited


def lamp(**edits):
    return read_lamp(Document.of(edited(LAMP, edits), "lamp.yaml"))


def composite(edits=None):
    return read_composite(Document.of(edited(COMPOSITE, edits or {}), "composite.yaml"))


def test_a_beam_not_given_is_the_tables_and_assumed():
    found = lamp(beam=None)
    assert (found.beam.spread_exponent, found.beam.provenance) == (2.5, "assumed")
    assert found.fields["beam"] == {"provenance": "assumed"}


def test_a_beam_is_found_again_from_its_own_readings():
    readings = [
        {"distance_mm": d, "irradiance_mw_cm2": round(1000 * on_axis_share(d, 8, 4.2), 4)} for d in (0.0, 4.0, 8.0)
    ]
    found = lamp(beam={"readings": readings, "provenance": "measured"})
    assert found.beam.spread_exponent == pytest.approx(4.2, abs=0.01)
    assert found.beam.provenance == "measured"


@pytest.mark.parametrize("readings", [[(0, 500), (8, 900)], [(8, 500), (0, 500)], [(4, 500), (4, 400)]])
def test_readings_that_do_not_fall_with_distance_fit_no_beam(readings):
    readings = [{"distance_mm": distance, "irradiance_mw_cm2": irradiance} for distance, irradiance in readings]
    with pytest.raises(Refused, match="no beam gives these readings") as refused:
        lamp(beam={"readings": readings, "provenance": "measured"})
    assert refused.value.problems[0].path == ("beam", "readings")


def test_two_modes_of_one_name_are_refused():
    with pytest.raises(Refused, match='two modes are called "on"') as refused:
        lamp(modes=LAMP["modes"] * 2)
    assert refused.value.problems[0].path == ("modes", 1, "id")


@pytest.mark.parametrize(("shares", "fine"), [((0.5, 0.5), True), ((0.6, 0.39), True), ((0.6, 0.3), False)])
def test_the_bands_of_a_mode_add_up_to_its_light(shares, fine):
    bands = [{"peak_nm": 410 + 50 * i, "width_nm": 20, "share": share} for i, share in enumerate(shares)]
    if fine:
        assert len(lamp(**{"modes/0/bands": bands}).modes[0].bands) == 2
    else:
        with pytest.raises(Refused, match=r"add up to 0\.9; they must add up to 1"):
            lamp(**{"modes/0/bands": bands})


def test_readings_until_a_day_are_those_of_the_mode_earliest_first():
    def entry(on, mode):
        return {"on": on, "mode": mode, "radiant_exitance_mw_cm2": 9, "meter": "unknown", "sleeve": "none"}

    modes = [{**LAMP["modes"][0], "id": name} for name in ("on", "boost")]
    readings = [entry("2026-05-03", "on"), entry("2026-05-01", "on"), entry("2026-05-02", "boost")]
    readings.append(entry("2026-05-04", "on"))
    found = lamp(modes=modes, readings=readings)
    day = found.readings[0].on
    assert [reading.on.day for reading in found.readings_until(day, "on")] == [1, 3]


def row(irradiance_mw_cm2, thickness_mm=2.0):
    return MakerRow(irradiance_mw_cm2, 20, thickness_mm, Band(460, 22, 1), band_assumed=False, provenance="maker")


@pytest.mark.parametrize(
    ("exitance", "chosen"), [(None, 500), (400, 500), (500, 500), (999, 500), (1000, 1000), (1700, 1000), (3000, 2000)]
)
def test_the_row_is_the_highest_that_the_lamp_reaches_else_the_lowest(exitance, chosen):
    rows = (row(1000), row(2000), row(500))
    assert chosen_row(rows, exitance).irradiance_mw_cm2 == chosen


def test_no_rows_no_row():
    assert chosen_row((), 1000) is None


def test_a_row_without_irradiance_or_seconds_is_no_row_and_without_thickness_no_complete_one():
    rows = [
        {"irradiance_mw_cm2": 500, "provenance": "maker"},
        {"time_s": 20, "provenance": "maker"},
        {"irradiance_mw_cm2": 500, "time_s": 20, "provenance": "maker"},
    ]
    found = composite({"maker_instructions": rows})
    assert len(found.rows) == 1
    assert found.complete_rows() == ()


def test_a_rows_colour_is_assumed_where_its_peak_is_not_given():
    found = composite({"maker_instructions/0/peak_nm": None, "maker_instructions/0/width_nm": None}).rows[0]
    assert (found.band, found.band_assumed) == (Band(460, 22, 1), True)
    assert not composite().rows[0].band_assumed


def test_missing_initiators_are_camphorquinone_assumed():
    found = composite({"initiators": None, "resin_weight_share": None})
    ((initiator, mol_l),) = found.paste.parts
    assert (initiator.name, found.initiators_provenance, found.resin_provenance) == (
        "camphorquinone",
        "assumed",
        "assumed",
    )
    assert mol_l == pytest.approx(0.005 * 0.22 * 2000 / 166.22, rel=1e-4)


def test_an_initiators_concentration_by_hand():
    ((_, mol_l),) = composite().paste.parts
    assert mol_l == pytest.approx(0.003 * 0.2 * 2000 / 166.22, rel=1e-4)


def test_an_unknown_initiator_is_refused_at_its_place():
    with pytest.raises(Refused, match='no initiator is called "quinone"; those known are') as refused:
        composite({"initiators/0/what": "quinone"})
    assert refused.value.problems[0].path == ("initiators", 0, "what")


def test_the_cards_absorption_is_the_total_at_its_wavelength():
    found = composite()
    assert absorption_at(found.paste, 460) == pytest.approx(0.2)
    assert found.absorption_per_mm() == pytest.approx(0.2)
    assert 0 < found.paste.own_absorption_per_mm < 0.2


def test_the_worst_initiator_speaks_for_all():
    other = min(known_initiators().keys() - {"camphorquinone"})
    second = {"what": other, "weight_share_of_resin": 0.001, "provenance": "assumed"}
    assert composite().initiators_provenance == "maker"
    assert composite({"initiators": [COMPOSITE["initiators"][0], second]}).initiators_provenance == "assumed"


MUCH = {"initiators/0/weight_share_of_resin": 0.02, "optics/absorption_per_mm": 0.1}


def test_initiators_that_absorb_more_than_a_measured_total_are_refused_at_the_optics():
    text = """\
kind: composite
id: paste
title: A composite
shade: {group: medium, translucency: regular}
initiators: [{what: camphorquinone, weight_share_of_resin: 0.02, provenance: maker}]
resin_weight_share: 0.2
optics: {absorption_per_mm: 0.1, reduced_scattering_per_mm: 1, provenance: measured}
"""
    with pytest.raises(Refused, match=r"more than the measured total of 0\.1 /mm") as refused:
        read_composite(read_document(text, "card.yaml"))
    assert (refused.value.problems[0].place.line, refused.value.problems[0].place.column) == (7, 9)


def test_with_an_assumed_total_the_pastes_own_part_is_nothing():
    found = composite({**MUCH, "optics/provenance": "assumed"})
    assert found.paste.own_absorption_per_mm == 0.0
    assert found.absorption_per_mm() > 0.1


def test_assumed_initiators_take_at_most_a_measured_total():
    found = composite({"initiators": None, "optics/absorption_per_mm": 0.05})
    assert found.paste.own_absorption_per_mm == 0.0
    assert found.absorption_per_mm() == pytest.approx(0.05)


def test_initiators_in_an_assumed_amount_of_resin_take_at_most_a_measured_total():
    found = composite({"resin_weight_share": None, "optics/absorption_per_mm": 0.05})
    assert found.resin_provenance == "assumed"
    assert found.absorption_per_mm() == pytest.approx(0.05)


@pytest.mark.parametrize("absorption", [0.15, 0.3, 0.8])
def test_a_transmittance_is_turned_back_into_the_absorption_that_gives_it(absorption):
    share = slab(2.0, absorption, 1.0, refractive_index=1.5).transmittance
    optics = {"transmittance_share": share, "at_mm": 2.0, "provenance": "measured"}
    found = composite({"optics": optics, "initiators/0/weight_share_of_resin": 0.001})
    assert found.absorption_per_mm() == pytest.approx(absorption, rel=1e-3)
    assert found.optics_provenance == "measured"


def test_a_transmittance_that_no_paste_has_is_refused_at_its_place():
    with pytest.raises(Refused, match=r"no paste lets 0\.99 of the light through 4 mm") as refused:
        composite({"optics": {"transmittance_share": 0.99, "at_mm": 4.0, "provenance": "measured"}})
    assert refused.value.problems[0].path == ("optics", "transmittance_share")


@pytest.mark.parametrize(
    ("group", "translucency", "absorption", "scattering"),
    [("light", "translucent", 0.15, 1.0), ("dark", "regular", 0.25, 1.5), ("light", "opaque", 0.40, 2.0)],
)
def test_without_optics_the_shades_are_taken_and_marked_assumed(group, translucency, absorption, scattering):
    found = composite({"optics": None, "shade": {"group": group, "translucency": translucency}})
    assert found.optics_provenance == "assumed"
    assert found.absorption_per_mm() == pytest.approx(absorption)
    assert found.paste.reduced_scattering_per_mm == scattering
    assert found.fields["optics"] == {"provenance": "assumed"}


def test_layers_know_how_they_set_or_that_nobody_said():
    assert read_layer(Document.of(ADHESIVE, "bond")).cure == "light"
    assert read_layer(Document.of(edited(ADHESIVE, {"cure": None}), "bond")).cure is None


def test_the_worst_of_some_origins():
    assert worst(BEST_FIRST) == "assumed"
    assert worst(["maker", "measured"]) == "maker"
    assert worst(["published", "maker"]) == "published"
    assert worst([]) == "measured"
