"""The record: the schema that other programs rely on."""

from __future__ import annotations

import json
import math

import pytest
from conftest import BASE, EXAMPLES, with_key

import lubecheck
from lubecheck.faces.record import of_result, to_json
from lubecheck.model.reader import read_case

OPERATING = {"temperature": "degC", "viscosity": "mm^2/s", "reference_viscosity": "mm^2/s", "viscosity_ratio": "1",
             "friction_torque": "N*mm", "friction_power": "W", "churning_power": "W", "heat_removed": "W"}  # fmt: skip
GREASE = {"free_volume": "cm^3", "first_fill": "g", "fill_share": "1", "regrease_quantity": "g",
          "regrease_interval": "h"}  # fmt: skip
LIFE = {"load_ratio": "1", "rating_life": "h", "contamination_factor": "1", "life_modification_factor": "1",
        "modified_life": "h"}  # fmt: skip
LOADS = {"radial_load": "N", "axial_load": "N", "equivalent_load": "N", "minimum_load": "N", "needed_preload": "N",
         "other_radial_load": "N", "induced_thrust": "N"}  # fmt: skip
SPEEDS = {"lubricant_limit": "rpm", "kinematic_limit": "rpm", "thermal_reference_speed": "rpm",
          "thermally_safe_speed": "rpm"}  # fmt: skip
KEYS = ["schema", "title", "verdict", "governing", "limits", "operating", "grease", "life", "remedies", "notes",
        "cautions", "inputs"]  # fmt: skip
LIMIT = {"name", "state", "use", "demand", "allowed", "unit", "basis", "note"}


@pytest.fixture(scope="module", params=sorted(EXAMPLES.glob("*.toml")), ids=lambda path: path.stem)
def record(request):
    return json.loads(to_json(lubecheck.check(lubecheck.load_case(request.param))))


def test_every_key_of_the_schema_is_there(record):
    assert set(KEYS) <= set(record)
    assert all(set(limit) >= LIMIT for limit in record["limits"])


@pytest.mark.parametrize(("group", "units"), [("operating", OPERATING), ("grease", GREASE), ("life", LIFE),
                                             ("loads", LOADS), ("speeds", SPEEDS)])  # fmt: skip
def test_every_figure_has_its_unit(record, group, units):
    if record[group] is None:
        assert group == "grease"
        return
    assert {name: record[group][name]["unit"] for name in units} == units
    assert all("value" in record[group][name] for name in units)


def test_the_temperature_has_a_band(record):
    temperature = record["operating"]["temperature"]
    assert temperature["low"] < temperature["value"] < temperature["high"]


def test_inputs_say_what_was_given_and_what_was_assumed():
    record = of_result(lubecheck.check(read_case(BASE)))
    assert record["inputs"]["given"]["duty[1].speed"] == "1480 rpm"
    assert any(item["name"] == "[limits] life" for item in record["inputs"]["assumed"])


def test_a_case_without_equilibrium_has_null_and_no_number():
    text = BASE.replace('kind = "motor end shield"\n', 'conductance = "0.01 W/K"\n').replace(
        'shaft_temperature = "75 degC"\n', 'machine_heat = "50 W"\n'
    )
    text = with_key(text, "surroundings", "draught", None)
    result = lubecheck.check(read_case(text))
    record = json.loads(to_json(result), parse_constant=pytest.fail)
    assert record["operating"]["temperature"]["value"] is None
    limit = next(limit for limit in record["limits"] if limit["name"] == "temperature")
    assert (limit["state"], limit["use"], limit["demand"]) == ("beyond", None, None)
    assert "no equilibrium below" in limit["note"]
    assert record["governing"] == "temperature"


FIGURES = {"cooling_factor": "1", "admissible_factor": "1", "conductance": "W/K", "fill": "1", "chi_square": "1",
           "error_scale": "1", "before": "degC", "after": "degC"}  # fmt: skip
READINGS = {"measured": "degC", "reading_error": "delta_degC", "before": "degC", "after": "degC",
            "residual": "delta_degC"}  # fmt: skip
EXPLANATION = {"cause", "needed", "unit", "usual_low", "usual_high", "surprise", "words"}


def test_the_calibration_is_null_without_a_measurement(record):
    assert (record["calibration"] is None) == ("measured" not in "".join(record["inputs"]["given"]))


@pytest.mark.parametrize(("temperature", "is_explained"), [("48 degC", True), ("60 degC", False)])
def test_the_calibration_has_its_measurements_figures_and_explanations(temperature, is_explained):
    text = (EXAMPLES / "measured_fan.toml").read_text().replace("48 degC", temperature)
    found = json.loads(to_json(lubecheck.check(read_case(text))), parse_constant=pytest.fail)["calibration"]
    assert found["is_explained"] is is_explained
    assert {name: found[name]["unit"] for name in FIGURES} == FIGURES
    (reading,) = found["measurements"]
    assert {name: reading[name]["unit"] for name in READINGS} == READINGS
    assert reading["place"] == "housing"
    assert bool(found["explanations"]) is not is_explained
    assert all(set(item) == EXPLANATION for item in found["explanations"])
    assert found["text"].startswith("Calibrated on 1 measurement" if is_explained else "Not calibrated")
    factor = found["cooling_factor"]
    assert factor["low"] <= factor["value"] <= factor["high"]
    assert (found["after"]["value"] is None) is not is_explained
    assert found["stop"] == ""  # nothing is over a limit
    assert found["chi_square"]["value"] is None  # of one measurement there is none


def test_no_number_of_a_record_is_endless(record):
    def walk(node):
        if isinstance(node, dict):
            for child in node.values():
                walk(child)
        elif isinstance(node, list):
            for child in node:
                walk(child)
        elif isinstance(node, float):
            assert math.isfinite(node)

    walk(record)
