"""The case reader: what it takes, and what it refuses, each with file, line, key, value and expectation."""

from __future__ import annotations

import math
from pathlib import Path

import pytest
from conftest import BASE, EXAMPLES, with_key

from lubecheck.errors import CaseError
from lubecheck.model import measured
from lubecheck.model.entries import TABLES
from lubecheck.model.entry import entries
from lubecheck.model.reader import load_case, read_case


def faults_of(text: str | bytes):
    with pytest.raises(CaseError) as caught:
        read_case(text, "pump.toml")
    return caught.value.faults


# table, key, TOML value, and a word that the message has to say
BAD_VALUES = [
    ("bearing", "designation", '"6390"', "63"),
    ("bearing", "designation", '"banana"', "designation"),
    ("bearing", "designation", '""', "text"),
    ("bearing", "designation", "6309", "text"),
    ("bearing", "dynamic_rating", '"53 kg"', "force"),
    ("bearing", "dynamic_rating", '"53"', "force"),
    ("bearing", "dynamic_rating", "53000", "force"),
    ("bearing", "dynamic_rating", '"-53 kN"', "force"),
    ("bearing", "dynamic_rating", '"0 N"', "force"),
    ("bearing", "dynamic_rating", '"53 kn"', "kN"),
    ("bearing", "static_rating", '"31,5 kN"', "decimal point"),
    ("bearing", "static_rating", '"31 500 N"', "without a separator"),
    ("bearing", "static_rating", '"30 kN + 1 kN"', "no arithmetic"),
    ("bearing", "static_rating", '"1e30 N"', "30"),
    ("bearing", "mass", '"nan kg"', "finite"),
    ("bearing", "mass", '"inf kg"', "finite"),
    ("bearing", "mass", "nan", "mass"),
    ("bearing", "mass", '"1.5 kg"', "less than 1229 g"),
    ("bearing", "cage", '"steal"', "steel"),
    ("bearing", "seal", '"shield"', "shields"),
    ("bearing", "clearance", '"C9"', "C3"),
    ("bearing", "bore", '"45 mm"', "beside a designation"),
    ("bearing", "f0", '"2 mm"', "number"),
    ("bearing", "f1", "2.0", "0.02"),
    ("bearing", "colour", '"red"', "colour"),
    ("bearing", "desgnation", '"6309"', "designation"),
    ("lubricant", "name", '"poliurea-110-2"', "polyurea-110-2"),
    ("lubricant", "name", "1", "text"),
    ("lubricant", "designation", '"KP2K-30"', "not both"),
    ("lubricant", "nu_40", '"110 N"', "kinematic viscosity"),
    ("lubricant", "highest", '"140 C"', "temperature"),
    ("lubricant", "highest", '"140 K"', "20 to 350"),
    ("lubricant", "ep", '"yes"', "true or false"),
    ("lubricant", "nlgi", "7", "000"),
    ("lubricant", "thickener", '"lithum"', "lithium"),
    ("duty", "speed", '"1480"', "speed"),
    ("duty", "speed", "1480", "speed"),
    ("duty", "speed", '"0 rpm"', "0.1"),
    ("duty", "speed", '"-1480 rpm"', "speed"),
    ("duty", "speed", '"1480 rmp"', "rpm"),
    ("duty", "speed", '"1480 mm"', "speed"),
    ("duty", "speed", '"1e9 rpm"', "200000"),
    ("duty", "speed", '["1480 rpm"]', "speed"),
    ("duty", "speed", "1979-05-27", "speed"),
    ("duty", "speed", "true", "speed"),
    ("duty", "speed", '"9**9**9 rpm"', "speed"),
    ("duty", "radial_load", '"1.9 kN 2"', "force"),
    ("duty", "radial_load", '"kN"', "force"),
    ("duty", "axial_load", '""', "force"),
    ("duty", "share", '"150 %"', "share"),
    ("duty", "share", "0.4", "add up"),
    ("duty", "load", '"1 kN"', "radial_load"),
    ("surroundings", "ambient", '"40"', "temperature"),
    ("surroundings", "ambient", '"40 K"', "-60 to 150"),
    ("surroundings", "ambient", '"400 degC"', "-60 to 150"),
    ("surroundings", "ambient", '"forty degC"', "temperature"),
    ("surroundings", "coldest", '"-10 delta_degC"', "temperature"),
    ("surroundings", "dust", '"filthy"', "very dusty"),
    ("surroundings", "orientation", '"upright"', "vertical"),
    ("surroundings", "altitude", '"99 km"', "length"),
    ("surroundings", "ambeint", '"40 degC"', "ambient"),
    ("housing", "kind", '"pedstal"', "pedestal"),
    ("housing", "area", '"0.1 m"', "area"),
    ("housing", "conductance", '"1.4 W/K"', "conductance"),
    ("housing", "machine_heat", '"12 W"', "either"),
    ("housing", "area", '"0.1 m^2"', "either kind or area"),
    ("housing", "relief", '"shut"', "closed"),
    ("grease", "fill", '"15 mm"', "mass"),
    ("grease", "fill", "15", "share"),
    ("grease", "fill", '"0 g"', "mass"),
    ("grease", "fill", '"-15 g"', "mass"),
    ("grease", "fill", '"lots"', "unknown"),
    ("grease", "interval", '"16"', "time"),
    ("grease", "interval", '"16 fortnights"', "time"),
    ("grease", "interval", "16", "time"),
    ("grease", "hours_per_day", '"25 h"', "24"),
    ("grease", "stroke", '"1 kg"', "50"),
    ("cleanliness", "setting", '"dirty"', "severe"),
    ("cleanliness", "setting", '"bath -/17/14"', "grease"),
    ("limits", "reliability", "1.0", "0.9995"),
    ("limits", "life", '"0 h"', "time"),
    ("oil", "supply", '"bath"', "grease"),
    ("gear", "ratio", "2", "bearing"),
    ("measured", "temperature", '"64"', "temperature"),
    ("measured", "temperature", '"900 degC"', "-60 to 400"),
    ("measured", "temperature", '"64 K"', "-60 to 400"),
    ("measured", "place", '"bearing"', "housing"),
    ("measured", "duty", "0.5", "1 to 1000"),
    ("measured", "duty", '"first"', "number"),
    ("measured", "speed", '"1480"', "speed"),
    ("measured", "radial_load", '"1.8 kg"', "force"),
    ("measured", "axial_load", '"200"', "force"),
    ("measured", "ambient", '"210 degC"', "-60 to 150"),
    ("measured", "draught", '"2 m"', "velocity"),
    ("measured", "shaft_temperature", '"75"', "temperature"),
    ("measured", "fill", '"unknown"', "mass or volume"),
    ("measured", "fill", '"0 g"', "mass"),
    ("measured", "reading_error", '"2 degC"', "temperature difference"),
    ("measured", "reading_error", '"0 K"', "0.1"),
    ("measured", "running_time", '"30"', "time"),
    ("measured", "tempereture", '"64 degC"', "temperature"),
]


@pytest.mark.parametrize(("table", "key", "value", "word"), BAD_VALUES)
def test_a_bad_value_is_refused_with_place_key_value_and_expectation(table, key, value, word):
    text = with_key(BASE, table, key, value)
    faults = faults_of(text)
    messages = [str(fault) for fault in faults]
    where = [m for m in messages if m.startswith("pump.toml:") and (key in m or table in m)]
    assert where, messages
    assert any(word in message for message in where), where
    named = [fault for fault in faults if key in fault.key or table in fault.key]
    assert any(fault.line and table.split("[")[0] in "\n".join(text.splitlines()[: fault.line]) for fault in named)


@pytest.mark.parametrize(
    ("content", "word"),
    [
        (b"", "empty"),
        (b"  \n\t\n", "empty"),
        (b"not a case at all", "TOML"),
        (b"<xml/>", "TOML"),
        (b'[bearing]\ndesignation = "6309', "TOML"),
        (BASE.encode() + b'[bearing]\ndesignation = "6310"\n', "bearing"),
        (b"\xff\xfe[bearing]", "UTF-8"),
        (BASE.encode().replace(b"6309", b"63\xb009"), "UTF-8"),
        (BASE.encode().replace(b"[bearing]", b"[[bearing]]") + b'[[bearing]]\ndesignation = "6310"\n', "2 of"),
        (b"bearing = 6309", "[bearing]"),
        (b"x = " + b"[" * 3000, "TOML"),
        (b"#" * 2_000_000, "bytes"),
    ],
)
def test_a_file_that_is_no_case_is_refused(content, word):
    messages = [str(fault) for fault in faults_of(content)]
    assert all(message.startswith("pump.toml") for message in messages)
    assert any(word in message for message in messages), messages


@pytest.mark.parametrize("table", ["bearing", "lubricant", "duty", "surroundings"])
def test_a_missing_table_is_named(table):
    head = f"[[{table}]]" if table == "duty" else f"[{table}]"
    start = BASE.index(head)
    end = BASE.find("\n[", start + 1)
    faults = faults_of(BASE[:start] + BASE[end + 1 :])
    assert [fault.key for fault in faults] == [table]


@pytest.mark.parametrize(("table", "key"), [("duty", "speed"), ("duty", "radial_load"), ("duty", "axial_load"),
                                            ("surroundings", "ambient")])  # fmt: skip
def test_a_missing_need_is_named(table, key):
    faults = faults_of(with_key(BASE, table, key, None))
    assert len(faults) == 1
    assert key in faults[0].key


def test_all_faults_come_at_once_in_the_order_of_the_file():
    text = BASE
    for table, key, value in (("bearing", "mass", '"1,5 kg"'), ("duty", "speed", '"1480"'),
                              ("surroundings", "dust", '"filthy"'), ("grease", "fill", "15")):  # fmt: skip
        text = with_key(text, table, key, value)
    faults = faults_of(text)
    assert [fault.key for fault in faults] == ["bearing.mass", "duty[1].speed", "surroundings.dust", "grease.fill"]
    assert [fault.line for fault in faults] == sorted(fault.line for fault in faults)


def test_a_fault_names_the_line_of_its_key():
    text = with_key(BASE, "surroundings", "dust", '"filthy"')
    (fault,) = faults_of(text)
    assert text.splitlines()[fault.line - 1] == 'dust = "filthy"'


def test_a_bore_that_is_no_smaller_than_the_outside_is_refused():
    text = BASE.replace(
        'designation = "6309"', 'family = "deep groove ball"\nbore = "100 mm"\noutside = "100 mm"\nwidth = "25 mm"'
    )
    (fault,) = faults_of(text)
    assert fault.key == "bearing.bore"
    assert "less than the outside" in fault.expected


def test_dimensions_that_are_not_all_there_are_named():
    text = BASE.replace('designation = "6309"', 'family = "deep groove ball"\nbore = "45 mm"')
    (fault,) = faults_of(text)
    assert "outside" in fault.expected
    assert "width" in fault.expected


def test_no_load_at_all_is_refused():
    text = with_key(with_key(BASE, "duty", "radial_load", '"0 N"'), "duty", "axial_load", '"0 N"')
    assert "above 0 N" in faults_of(text)[0].expected


def test_two_duty_points_need_their_shares():
    text = BASE + '\n[[duty]]\nspeed = "900 rpm"\nradial_load = "1 kN"\naxial_load = "0 N"\n'
    assert [fault.key for fault in faults_of(text)] == ["duty[1].share", "duty[2].share"]


def test_a_directory_and_a_missing_file_are_refused(tmp_path):
    for path, word in ((tmp_path, "directory"), (tmp_path / "none.toml", "no such file"), ("a\0b", "not a file name")):
        with pytest.raises(CaseError, match=word):
            load_case(path)


def test_a_shaft_in_hertz_turns_so_many_times_a_second():
    case = read_case(with_key(BASE, "duty", "speed", '"25 Hz"'))
    assert case.duty[0].speed == 1500.0


@pytest.mark.parametrize(
    ("table", "key", "value", "expected"),
    [
        ("surroundings", "ambient", '"104 degF"', 40.0),
        ("surroundings", "ambient", '"313.15 K"', 40.0),
        ("surroundings", "draught", '"196.8503937 ft/min"', 1.0),
        ("housing", "void", '"3.661425 in^3"', 60.0),
        ("housing", "void", '"60 ml"', 60.0),
    ],
)
def test_any_unit_of_the_right_dimension_is_taken(table, key, value, expected):
    case = read_case(with_key(BASE, table, key, value))
    assert math.isclose(getattr(getattr(case, table), key), expected, rel_tol=1e-6)


def test_an_inch_bearing_is_read_by_its_dimensions():
    text = BASE.replace(
        'designation = "6309"', 'family = "deep groove ball"\nbore = "1.75 in"\noutside = "3.75 in"\nwidth = "13/16"'
    )
    assert [fault.key for fault in faults_of(text)] == ["bearing.width"]
    case = read_case(text.replace('"13/16"', '"0.8125 in"'))
    assert math.isclose(case.bearing.bore, 44.45)


def test_an_interval_in_weeks_runs_by_the_calendar_and_one_in_hours_does_not():
    weeks = read_case(with_key(BASE, "grease", "interval", '"10 week"')).grease.interval
    hours = read_case(with_key(BASE, "grease", "interval", '"1680 h"')).grease.interval
    assert weeks.value == hours.value == 1680.0
    assert (weeks.is_calendar, hours.is_calendar) == (True, False)


def test_a_byte_order_mark_and_windows_line_ends_are_taken():
    assert read_case(b"\xef\xbb\xbf" + BASE.replace("\n", "\r\n").encode()).bearing.bore == 45.0


@pytest.mark.parametrize("path", sorted(EXAMPLES.glob("*.toml")), ids=lambda path: path.stem)
def test_every_example_is_read(path: Path):
    case = load_case(path)
    assert case.title
    assert case.given


@pytest.mark.parametrize(("table", "key", "entry"), [(t, k, e) for t, form in TABLES.items() for k, e in entries(form)])
def test_every_key_says_what_it_is_and_what_it_expects(table, key, entry):
    assert len(entry.meaning) > 3, (table, key)
    assert entry.expected
    if entry.kinds and not entry.words:
        assert entry.example, (table, key)


PUMP = (EXAMPLES / "oil_bath_pump.toml").read_text()
PINION = (EXAMPLES / "pinion_shaft.toml").read_text()
MEASURED = '\n[measured]\ntemperature = "64 degC"\n'
READ = BASE + MEASURED
SET_POINTS = '\n[limits]\nalarm = "90 degC"\ntrip = "100 degC"\n'


@pytest.mark.parametrize(
    ("text", "changes", "key", "word"),
    [
        (BASE, [("housing", "area", '"0.1 m^2"')], "housing.kind", "either kind or area"),
        (BASE, [("housing", "kind", None), ("housing", "conductance", '"1 W/K"')], "surroundings.draught",
         "beside [housing] conductance"),
        (BASE, [("housing", "kind", None), ("housing", "conductance", '"1 W/K"'), ("surroundings", "draught", None),
                ("duty", "draught", '"2 m/s"')], "duty[1].draught", "beside [housing] conductance"),
        (BASE, [("housing", "shaft_temperature", None), ("housing", "machine_heat", '"12 W"'),
                ("duty", "shaft_temperature", '"75 degC"')], "duty[1].shaft_temperature", "either this or"),
        (PUMP, [("oil", "flow", '"0.5 l/min"')], "oil.flow", "circulating"),
        (PUMP, [("oil", "inlet", '"45 degC"')], "oil.inlet", "circulating"),
        (PUMP, [("oil", "supply", None), ("oil", "flow", '"0.5 l/min"')], "oil.flow", "beside no supply"),
        (PUMP, [("oil", "supply", '"mist"'), ("cleanliness", "setting", '"normal"'),
                ("oil", "inlet", '"45 degC"')], "oil.inlet", 'beside supply "mist"'),
        (BASE, [("lubricant", "thickener", '"sodium"')], "lubricant.thickener", "by its figures"),
        (BASE, [("lubricant", "nlgi", '"000"')], "lubricant.nlgi", "by its figures"),
        (BASE, [("lubricant", "base_oil", '"ester"')], "lubricant.base_oil", "by its figures"),
        (READ, [("measured", "duty", "2")], "measured.duty", "1 to 1"),
        (READ, [("measured", "duty", "1.5")], "measured.duty", "1 to 1"),
        (READ, [("measured", "running_time", '"2 h"')], "measured.running_time", "at least 4 h"),
        (READ, [("measured", "place", '"oil outlet"')], "measured.place", "flow and inlet"),
        (READ, [("measured", "radial_load", '"0 N"'), ("measured", "axial_load", '"0 N"')], "measured.radial_load",
         "above 0 N"),
        (READ, [("housing", "kind", None), ("surroundings", "draught", None), ("housing", "conductance", '"1 W/K"'),
                ("measured", "draught", '"2 m/s"')], "measured.draught", "beside [housing] conductance"),
        (READ, [("housing", "kind", None), ("surroundings", "draught", None), ("housing", "conductance", '"1 W/K"'),
                ("grease", "fill", '"unknown"'), ("measured", "fill", '"15 g"')], "measured.fill", "it is what is"),
        (READ, [("housing", "shaft_temperature", None), ("housing", "machine_heat", '"12 W"'),
                ("measured", "shaft_temperature", '"75 degC"')], "measured.shaft_temperature", "either this or"),
        (READ, [("surroundings", "ambient_lowest", '"0 degC"'), ("surroundings", "ambient_highest", '"50 degC"')],
         "measured.ambient", "each month"),
        (PUMP + MEASURED, [], "measured.duty", "since there are 2 duty points"),
        (PUMP + MEASURED, [("measured", "speed", '"1480 rpm"')], "measured.duty", "no radial_load, axial_load"),
        (PUMP + MEASURED, [("measured", "duty", "3")], "measured.duty", "1 to 2"),
        (PUMP + MEASURED, [("measured", "duty", "2"), ("measured", "fill", '"15 g"')], "measured.fill", "is oil"),
        (READ, [("measured", "running_time", '"20 min"')], "measured.running_time", 'given "20 min"'),
        (BASE + SET_POINTS, [("limits", "alarm", '"101 degC"')], "limits.alarm",
         "given 101 degC; expected at most [limits] trip, 100 degC"),
        (BASE + SET_POINTS, [("limits", "alarm", '"40 degC"')], "limits.alarm",
         "above [surroundings] ambient, 40 degC"),
        (BASE + SET_POINTS, [("limits", "alarm", None), ("limits", "trip", '"35 degC"')], "limits.trip",
         "above [surroundings] ambient, 40 degC"),
        (PINION + MEASURED, [("measured", "radial_load", '"3 kN"')], "measured.radial_load", "by its number"),
    ],
)  # fmt: skip
def test_facts_that_contradict_each_other_are_one_clear_fault(text, changes, key, word):
    for table, name, value in changes:
        text = with_key(text, table, name, value)
    (fault,) = [fault for fault in faults_of(text) if fault.key == key]
    assert word in str(fault)
    assert len(faults_of(text)) == 1
    assert fault.line


def test_a_lubricant_whose_figures_were_changed_says_so_in_its_name():
    changed = read_case(with_key(BASE, "lubricant", "nu_40", '"90 mm^2/s"')).lubricant
    assert changed.name == read_case(BASE).lubricant.name + ", figures changed by the user"
    same = read_case(with_key(BASE, "lubricant", "nu_40", '"110 mm^2/s"')).lubricant
    assert same.name == read_case(BASE).lubricant.name


def test_a_measured_temperature_may_stand_alone_or_among_several():
    one = read_case(READ).measured
    several = read_case(BASE + "".join(MEASURED.replace("[measured]", "[[measured]]") for _ in range(3))).measured
    assert len(one) == 1
    assert several == one * 3


@pytest.mark.parametrize(
    ("text", "key", "word"),
    [
        (BASE + MEASURED.replace("[measured]", "[[measured]]") + '\n[[measured]]\nspeed = "2 rpm"\n',
         "measured[2].temperature", "temperature"),
        (BASE + MEASURED.replace("[measured]", "[[measured]]") * 2 + "duty = 4\n", "measured[2].duty", "1 to 1"),
        ('measured = "64 degC"\n' + BASE, "measured", "[measured] table"),
        ("measured = [64]\n" + BASE, "measured", "[measured] table"),
        (BASE + MEASURED.replace("[measured]", "[[measured]]") * 101, "measured", "at most 100"),
    ],
)  # fmt: skip
def test_a_fault_of_a_measurement_says_which(text, key, word):
    (fault,) = faults_of(text)
    assert fault.key == key
    assert word in str(fault)
    assert fault.line


@pytest.mark.parametrize("heads", [("[measured]", "[[measured]]"), ("[[measured]]", "[measured]"),
                                   ("[measured]", "[measured]")])  # fmt: skip
def test_one_measured_table_beside_several_is_told_how_to_write_both(heads):
    text = BASE + "".join(MEASURED.replace("[measured]", head) for head in heads)
    (fault,) = faults_of(text)
    assert fault.key == "measured"
    assert "write both as [[measured]]" in str(fault)
    assert fault.line == text[: text.rindex("[measured]")].count("\n") + 1


@pytest.mark.parametrize("alarm", ["100 degC", "90 degC"])
def test_an_alarm_may_be_as_high_as_the_trip(alarm):
    assert read_case(with_key(BASE + SET_POINTS, "limits", "alarm", f'"{alarm}"')).limits.trip == 100.0


def test_a_measurement_stands_on_its_duty_point_or_on_what_it_says():
    two = read_case(PUMP + MEASURED + "duty = 2\n")
    state = measured.at_state(two, two.measured[0])
    assert state.duty[0].radial_load == two.duty[1].radial_load
    assert state.duty[0].shaft_temperature == two.duty[1].shaft_temperature
    own = read_case(PUMP + MEASURED + 'speed = "900 rpm"\nradial_load = "1 kN"\naxial_load = "2 kN"\n')
    duty = measured.at_state(own, own.measured[0]).duty[0]
    assert (duty.speed, duty.radial_load, duty.axial_load) == (900.0, 1000.0, 2000.0)
    months = with_key(BASE, "surroundings", "ambient_lowest", '"0 degC"')
    months = with_key(months, "surroundings", "ambient_highest", '"50 degC"')
    read = read_case(months + MEASURED + 'ambient = "12 degC"\nfill = "50 %"\n')
    state = measured.at_state(read, read.measured[0])
    assert len(state.duty) == 1
    assert state.duty[0].ambient == 12.0
    assert state.surroundings.ambient_lowest is None
    assert state.grease.fill.value == 0.5
