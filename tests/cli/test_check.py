"""`farside check`: exit status, what goes where, and never a traceback."""

import csv
import io
import json
import os
import subprocess
import sys
from pathlib import Path

import pytest
from farside.cli import main

TOP = Path(__file__).parents[2]
CLINIC = TOP / "rules" / "example-clinic"
PLANS = CLINIC / "plans"
IN_A_PROCESS = [sys.executable, "-c", "import sys; from farside.cli import main; sys.exit(main())"]

LAMP = """\
kind: lamp
id: {id}
title: Another lamp
tip_diameter_mm: 8
beam: {{spread_exponent: 3, provenance: measured}}
modes: [{{id: standard, times_s: [20], bands: [{{peak_nm: 460, width_nm: 22, share: 1}}]}}]
readings: [{{"on": "2026-11-20", mode: standard, radiant_exitance_mw_cm2: 1000, meter: laboratory, sleeve: none}}]
"""


def farside(capsys, *words):
    """Status, standard output and standard error of a call."""
    try:
        status = main([str(word) for word in words])
    except SystemExit as left:  # argparse's own way out
        status = left.code
    out, err = capsys.readouterr()
    return status, out, err


def in_a_process(*words, text="", **environment):
    """The same in a process of its own, for what only a process has."""
    called = [*IN_A_PROCESS, *map(str, words)]
    env = {**os.environ, "PYTHONPATH": str(TOP / "engine"), **environment}
    return subprocess.run(called, input=text.encode(), capture_output=True, env=env, check=False, timeout=120)


def plan_with(tmp_path, old, new, name="shallow-clear"):
    text = (PLANS / f"{name}.yaml").read_text(encoding="utf-8")
    assert old in text
    path = tmp_path / "clinic" / "plans" / "plan.yaml"
    path.parent.mkdir(parents=True)
    path.write_text(text.replace(old, new), encoding="utf-8")
    return path


def card_options():
    return [word for kind in ("lamps", "composites", "adhesives", "liners") for word in ("--cards", CLINIC / kind)]


@pytest.mark.parametrize(
    ("plan", "status", "verdict"),
    [
        ("shallow-clear", 0, "clear"), ("through-overlay", 0, "watch"), ("dark-canine", 1, "revise"),
        ("bright-room", 1, "revise"), ("deep-box", 1, "stop"),
    ],
)  # fmt: skip
def test_the_status_follows_from_the_verdict(capsys, plan, status, verdict):
    found, out, err = farside(capsys, "check", PLANS / f"{plan}.yaml", "--format", "json")
    assert (found, json.loads(out)["verdict"], err) == (status, verdict, "")


def test_an_open_verdict_gives_1(capsys, tmp_path):
    path = plan_with(tmp_path, "remaining_dentine_mm: 3.2, ", "")
    status, out, err = farside(capsys, "check", path, *card_options(), "--format", "json")
    assert (status, json.loads(out)["verdict"], err) == (1, "open", "")


def test_the_three_formats_tell_of_one_report(capsys):
    plan = PLANS / "deep-box.yaml"
    _, text, _ = farside(capsys, "check", plan)
    _, data, _ = farside(capsys, "check", plan, "--format", "json")
    _, table, _ = farside(capsys, "check", plan, "--format", "csv")
    assert text.startswith("Lower molar, mesial box · for 30 November 2026 · protocol base")
    report = json.loads(data)
    rows = list(csv.DictReader(io.StringIO(table, newline="")))
    assert [row["says"] for row in rows] == [finding["says"] for finding in report["findings"]]
    assert report["findings"][0]["says"] in " ".join(text.split())
    assert {row["verdict"] for row in rows} == {report["verdict"]} == {"stop"}


def test_on_overrides_the_plans_own_day(capsys):
    _, out, _ = farside(capsys, "check", PLANS / "shallow-clear.yaml", "--on", "2026-12-03", "--format", "json")
    assert json.loads(out)["on"] == "2026-12-03"


@pytest.mark.parametrize("day", ["2026-02-30", "tomorrow", "", "30.11.2026"])
def test_what_is_no_day_is_refused(capsys, day):
    status, out, err = farside(capsys, "check", PLANS / "shallow-clear.yaml", "--on", day)
    assert (status, out) == (2, "")
    assert "is no date; write it as 2026-11-30" in err


def test_cards_are_looked_for_in_folders_named_first_and_beside_the_plan(capsys, tmp_path):
    path = plan_with(tmp_path, "card: chair-3-wide", "card: another-lamp")
    own = tmp_path / "own"
    own.mkdir()
    (own / "lamp.yaml").write_text(LAMP.format(id="another-lamp"), encoding="utf-8")
    status, out, err = farside(capsys, "check", path)
    assert (status, out) == (2, "")
    assert 'no lamp card has the id "another-lamp"; none is at hand' in err
    status, out, _ = farside(capsys, "check", path, "--cards", own, *card_options(), "--format", "json")
    assert json.loads(out)["lamp"]["id"] == "another-lamp"
    beside = path.parent.parent / "lamps"
    beside.mkdir()
    (beside / "lamp.yaml").write_text(LAMP.format(id="another-lamp"), encoding="utf-8")
    rest = card_options()[2:]  # without the folder of lamps
    _, out, _ = farside(capsys, "check", path, *rest, "--format", "json")
    assert json.loads(out)["lamp"]["id"] == "another-lamp"


def test_two_cards_of_one_id_are_refused(capsys, tmp_path):
    (tmp_path / "lamp.yaml").write_text(LAMP.format(id="chair-3-wide"), encoding="utf-8")
    status, out, err = farside(capsys, "check", PLANS / "shallow-clear.yaml", "--cards", tmp_path)
    assert (status, out) == (2, "")
    assert 'two lamp cards have the id "chair-3-wide"' in err


def test_the_clinics_usual_values_are_found_beside_or_named(capsys, tmp_path):
    path = plan_with(tmp_path, "site: posterior\n", "")
    (path.parent.parent / "clinic.yaml").write_text("kind: clinic\ntitle: A\nusual: {site: anterior}\n")
    (tmp_path / "other.yaml").write_text("kind: clinic\ntitle: B\nusual: {gap_mm: 1, site: posterior}\n")

    def values(*options):
        _, out, _ = farside(capsys, "check", path, *card_options(), *options, "--format", "json")
        return {k: v for finding in json.loads(out)["findings"] for k, v in finding["values"].items()}

    assert values()["plan.site"] == "anterior"
    assert values("--clinic", tmp_path / "other.yaml")["plan.site"] == "posterior"
    (path.parent.parent / "clinic.yaml").unlink()
    assert "plan.site" not in values()


WRONG = {
    "no such file": ["check", "nothing.yaml"],
    "a folder": ["check", TOP],
    "not a plan": ["check", CLINIC / "lamps" / "chair-2-blue.yaml"],
    "no such folder of cards": ["check", PLANS / "deep-box.yaml", "--cards", "nothing"],
    "a file for a folder": ["check", PLANS / "deep-box.yaml", "--cards", PLANS / "deep-box.yaml"],
    "no such clinic": ["check", PLANS / "deep-box.yaml", "--clinic", "nothing.yaml"],
    "a plan for a clinic": ["check", PLANS / "deep-box.yaml", "--clinic", PLANS / "deep-box.yaml"],
    "unknown format": ["check", PLANS / "deep-box.yaml", "--format", "xml"],
    "no plan": ["check"],
    "no command": [],
    "unknown command": ["chek"],
    "unknown rule": ["rules", "far-side"],
    "unknown kind": ["schema", "plam"],
}


@pytest.mark.parametrize("case", WRONG)
def test_a_wrong_call_gives_2_and_a_word_on_standard_error(capsys, case):
    status, out, err = farside(capsys, *WRONG[case])
    assert (status, out) == (2, "")
    assert err.strip()
    assert "Traceback" not in err


def test_a_wrong_plan_gives_its_place_and_its_line(capsys, tmp_path):
    path = plan_with(tmp_path, "thickness_mm: 1.6", "thicknes_mm: 1.6")
    status, out, err = farside(capsys, "check", path)
    assert (status, out) == (2, "")
    first, second, *_ = err.splitlines()
    line = next(n for n, text in enumerate(path.read_text().splitlines(), 1) if "thicknes_mm" in text)
    assert first.startswith(f"{path}:{line}:5: ")
    assert 'did you mean "thickness_mm"' in err
    assert f"{line} |     thicknes_mm: 1.6" in second


def test_a_broken_file_in_a_card_folder_is_named_with_its_place(capsys, tmp_path):
    (tmp_path / "broken.yaml").write_text("kind: lamp\nid: [a\n", encoding="utf-8")
    status, out, err = farside(capsys, "check", PLANS / "deep-box.yaml", "--cards", tmp_path)
    assert (status, out) == (2, "")
    assert err.startswith(f"{tmp_path / 'broken.yaml'}:2:")


def test_standard_input_is_a_plan_too():
    text = (PLANS / "shallow-clear.yaml").read_text(encoding="utf-8")
    done = in_a_process("check", "-", *card_options(), "--format", "json", text=text)
    assert (done.returncode, done.stderr) == (0, b"")
    assert json.loads(done.stdout)["verdict"] == "clear"


@pytest.mark.parametrize("text", ["", "kind: plan\n", "\0", "[", '{"kind": "plan"', "a: &a [*a]\n"])
def test_bad_standard_input_is_named_as_such(text):
    done = in_a_process("check", "-", text=text)
    assert (done.returncode, done.stdout) == (2, b"")
    assert done.stderr.startswith(b"standard input")
    assert b"Traceback" not in done.stderr


def test_too_large_a_plan_is_refused_soon():
    done = in_a_process("check", "-", text="#" * 2_000_000)
    assert done.returncode == 2
    assert b"at most 1000000" in done.stderr


@pytest.mark.parametrize("encoding", ["ascii", "cp1252", "utf-8"])
def test_marks_come_through_whatever_the_machines_encoding(encoding):
    done = in_a_process("check", PLANS / "deep-box.yaml", PYTHONIOENCODING=encoding, PYTHONUTF8="0")
    assert done.returncode == 1
    assert done.stderr == b""
    assert "■ stop" in done.stdout.decode("utf-8")
    data = in_a_process("check", PLANS / "deep-box.yaml", "--format", "json", PYTHONIOENCODING=encoding)
    assert json.loads(data.stdout.decode("utf-8"))["plan"]["title"] == "Lower molar, mesial box"


def test_a_reader_that_goes_away_is_no_accident():
    called = [*IN_A_PROCESS, "schema", "plan"]
    env = {**os.environ, "PYTHONPATH": str(TOP / "engine")}
    with subprocess.Popen(called, stdout=subprocess.PIPE, stderr=subprocess.PIPE, env=env) as process:
        process.stdout.close()
        err = process.stderr.read()
    assert err == b""
    assert process.returncode == 2
