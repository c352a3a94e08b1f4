"""Fatigue life of a position: what it is told by, what eats it, what takes it, and the words for it."""

from __future__ import annotations

import json
import math

import pytest
from conftest import BASE, EXAMPLES, with_key

import lubecheck
from lubecheck.errors import CaseError
from lubecheck.faces.record import to_json
from lubecheck.model.reader import read_case

PUMP = (EXAMPLES / "oil_bath_pump.toml").read_text(encoding="utf-8")


def life(text):
    return lubecheck.check(read_case(text)).life.modified_life.m_as("h")


def pump(**cleanliness):
    """The pump's case with its cleanliness told in another way."""
    head, _, tail = PUMP.partition("[cleanliness]")
    rest = tail[tail.index("[limits]") :]
    lines = "".join(f"{key} = {json.dumps(value)}\n" for key, value in cleanliness.items())
    return f"{head}[cleanliness]\n{lines}\n{rest}"


@pytest.mark.parametrize("word", ["sealed", "shielded", "clean hall", "workshop", "dusty hall", "dusty quarry"])
def test_a_plain_word_is_the_class_that_the_standard_describes(word):
    setting = {"sealed": "high", "shielded": "normal", "clean hall": "normal", "workshop": "slight",
               "dusty hall": "severe", "dusty quarry": "very severe"}[word]  # fmt: skip
    plain = with_key(with_key(BASE, "cleanliness", "setting", None), "cleanliness", "described", f'"{word}"')
    assert life(plain) == life(with_key(BASE, "cleanliness", "setting", f'"{setting}"'))


def test_a_code_an_analysis_and_a_class_that_say_the_same_give_the_same_life():
    by_class = life(pump(setting="bath -/15/12"))
    assert life(pump(code="18/15/12")) == life(pump(code="-/15/12")) == by_class
    assert life(pump(count_6=210, count_14=38)) == by_class
    assert life(pump(described="clean hall")) == by_class


def test_an_in_line_filter_lengthens_life_and_a_dull_one_does_not():
    stream = 'flow = "0.5 l/min"\ninlet = "50 degC"'
    circulating = PUMP.replace('supply = "bath"', 'supply = "circulating"').replace('level = "0 mm"', stream)
    head, _, tail = circulating.partition("[cleanliness]")
    rest = tail[tail.index("[limits]") :]

    def told(text):
        return life(f"{head}[cleanliness]\n{text}\n{rest}")

    code = 'code = "-/17/14"\n'
    unfiltered, in_line = told(code), told(code + 'filter = "in line"')
    fine = told('filter = "in line"\nfilter_size = "12 um"\nfilter_beta = 200')
    dull = told(code + 'filter = "in line"\nfilter_size = "40 um"\nfilter_beta = 75')
    assert dull < in_line < fine
    assert unfiltered < in_line


@pytest.mark.parametrize(
    ("keys", "named"),
    [
        ({"code": "-/15/12", "described": "workshop"}, "one way to say how clean"),
        ({"code": "12/15/18"}, "ISO 4406"),
        ({"count_6": 210}, "both count_6 and count_14"),
        ({"setting": "bath -/15/12", "filter_size": "12 um"}, "both filter_size and filter_beta"),
        ({"code": "-/15/12", "filter": "off line", "filter_size": "12 um", "filter_beta": 200}, "in line"),
        ({"described": "workshp"}, "nearest: workshop"),
    ],
)
def test_a_contradiction_is_refused(keys, named):
    with pytest.raises(CaseError, match=named):
        read_case(pump(**keys))


@pytest.mark.parametrize("key", ['code = "-/15/12"', "count_6 = 3", 'filter = "in line"', 'water = "100 ppm"'])
def test_what_is_about_oil_is_refused_for_grease(key):
    with pytest.raises(CaseError, match="it is about oil"):
        read_case(BASE + key + "\n")


def test_water_shortens_life_by_cantleys_law_and_says_so():
    dry, wet = pump(setting="bath -/17/14", water="100 ppm"), pump(setting="bath -/17/14", water="300 ppm")
    assert life(wet) / life(dry) == pytest.approx((100 / 300) ** 0.6)
    assert "water of 300 ppm" in lubecheck.check(read_case(wet)).limit("fatigue_life").note
    drowned = lubecheck.check(read_case(pump(setting="bath -/17/14", water="0.1 %")))
    assert drowned.limit("fatigue_life").state == "unknown"
    assert "water in the oil is over 400 ppm" in drowned.limit("fatigue_life").note


def test_a_wet_place_whose_oil_was_not_tested_is_judged_at_the_wettest_oil_too():
    text = PUMP.replace('water = "dry"', 'water = "wet"')
    limit = lubecheck.check(read_case(text)).limit("fatigue_life")
    assert limit.state == "unknown"
    assert "[cleanliness] water" in limit.note


@pytest.mark.parametrize(
    ("key", "value", "is_longer"), [("radial_load", '"3.8 kN"', False), ("radial_load", '"1 kN"', True)]
)
def test_life_falls_with_load(key, value, is_longer):
    assert (life(with_key(BASE, "duty", key, value)) > life(BASE)) == is_longer


def test_life_falls_with_dirt_and_with_temperature_by_way_of_the_film():
    dirty = with_key(BASE, "cleanliness", "setting", '"severe"')
    thin = with_key(BASE, "duty", "speed", '"300 rpm"')
    hot = with_key(thin, "surroundings", "ambient", '"75 degC"')
    assert life(dirty) < life(BASE)
    assert life(hot) < life(thin)


def test_life_rises_when_less_reliability_is_asked_for():
    lives = [life(with_key(BASE, "limits", "reliability", f'"{r} %"')) for r in (99.95, 99, 95, 90, 70, 50)]
    assert lives == sorted(lives)
    assert lives[-1] / lives[3] == pytest.approx(3.4, abs=0.1)


def test_hot_rings_lower_the_rating_and_rings_not_made_for_it_leave_the_life_unknown():
    hot = with_key(BASE, "housing", "shaft_temperature", '"295 degC"')
    hot = with_key(hot, "surroundings", "ambient", '"150 degC"')
    hot = with_key(hot, "bearing", "fatigue_limit", '"1.43 kN"')  # stated, so that no estimate leaves the life open
    plain = lubecheck.check(read_case(hot))
    stable = lubecheck.check(read_case(hot.replace('"6309"', '"6309 S2"')))
    temperature = plain.operating.temperature.m_as("degC")
    assert 160 < temperature < 250
    assert plain.limit("fatigue_life").state == "unknown"
    assert "stabilised to 120 degC only" in plain.limit("fatigue_life").note
    factor = 1 - 0.1 * (temperature - 150) / 50 if temperature < 200 else 0.9 - 0.15 * (temperature - 200) / 50
    cool_ratio = lubecheck.check(read_case(BASE)).life.load_ratio.magnitude
    assert stable.life.load_ratio.magnitude == pytest.approx(cool_ratio / factor, rel=1e-6)
    assert stable.limit("fatigue_life").state != "unknown" or "kappa is under 0.1" in stable.limit("fatigue_life").note


def test_a_load_over_half_the_rating_and_a_film_under_a_tenth_are_unknown():
    heavy = lubecheck.check(read_case(with_key(BASE, "duty", "radial_load", '"28 kN"')))
    assert (heavy.limit("fatigue_life").state, "P is over 0.5 C" in heavy.limit("fatigue_life").note) == (
        "unknown",
        True,
    )
    slow = lubecheck.check(read_case(with_key(BASE, "duty", "speed", '"1 rpm"')))
    assert (slow.limit("fatigue_life").state, "kappa is under 0.1" in slow.limit("fatigue_life").note) == (
        "unknown",
        True,
    )


def test_a_factor_held_at_the_cap_is_said():
    clean = with_key(with_key(BASE, "cleanliness", "setting", '"high"'), "limits", "reliability", '"99.95 %"')
    capped = lubecheck.check(read_case(with_key(clean, "duty", "radial_load", '"3.4 kN"')))
    assert capped.life.modified_life.m_as("h") < 200_000
    assert "a_ISO held at 50, the cap of the standard" in capped.limit("fatigue_life").note
    assert capped.life.life_modification_factor.magnitude == pytest.approx(50)


def test_a_life_beyond_200000_h_names_what_may_end_the_bearing_instead():
    long = with_key(BASE, "duty", "radial_load", '"800 N"')
    note = lubecheck.check(read_case(long)).limit("fatigue_life").note
    assert "over 200 000 h: fatigue will not end this bearing; what may is the grease, if it is not renewed" in note
    dirty = with_key(with_key(long, "cleanliness", "setting", '"very severe"'), "duty", "radial_load", '"500 N"')
    note = lubecheck.check(read_case(dirty)).limit("fatigue_life").note
    assert "what may is dirt that wears the raceways" in note
    sealed = long.replace('"6309"', '"6309-2Z"').replace('interval = "16 week"\n', "")
    assert "sealed in it" in lubecheck.check(read_case(sealed)).limit("fatigue_life").note


def test_the_words_say_what_a_rated_life_is():
    note = lubecheck.check(read_case(PUMP)).limit("fatigue_life").note
    for words in (
        "90 of 100 such bearings run longer",
        "first pit of about 6.5 mm^2",
        "seizure or break-up can follow",
    ):
        assert words in note


def test_damage_shares_add_up_and_name_the_point_that_eats_the_life():
    result = lubecheck.check(read_case(PUMP))
    shares = [point.share_of_damage for point in result.damage]
    assert math.fsum(shares) == pytest.approx(1, abs=1e-12)
    # By hand: share of time over own life, in proportion.
    rates = [point.share_of_time / point.life_h for point in result.damage]
    assert shares == pytest.approx([rate / sum(rates) for rate in rates])
    assert 1 / sum(rates) == pytest.approx(result.life.modified_life.m_as("h"))
    assert f"duty point 1 eats {shares[0] * 100:.0f} %" in result.limit("fatigue_life").note
    assert result.damage[0].temperature != result.damage[1].temperature


def test_equal_points_take_damage_by_their_time_and_equal_one_point():
    one = read_case(BASE)
    text = BASE.replace("[[duty]]", '[[duty]]\nshare = "30 %"')
    again = text[text.index("[[duty]]") : text.index("[surroundings]")].replace("30 %", "70 %")
    two = lubecheck.check(read_case(text.replace("[surroundings]", again + "[surroundings]")))
    assert [point.share_of_damage for point in two.damage] == pytest.approx([0.3, 0.7])
    assert two.life.modified_life.m_as("h") == pytest.approx(lubecheck.check(one).life.modified_life.m_as("h"))


CASES = [*sorted(EXAMPLES.glob("*.toml")), *sorted((EXAMPLES / "gearbox").glob("[!c]*.toml"))]


@pytest.mark.parametrize("path", CASES, ids=lambda path: path.stem)
def test_the_parts_of_the_loss_account_explain_the_whole_and_name_the_interaction(path):
    result = lubecheck.check(lubecheck.load_case(path))
    account = result.losses
    assert account.life_h == pytest.approx(result.life.modified_life.m_as("h"), rel=1e-9)
    known = [part for part in account.parts if part.factor is not None]
    product = math.prod(part.factor for part in known)
    assert {name for part in known for name in (*part.covers, part.name)} == {part.name for part in account.parts}
    assert product == pytest.approx(account.life_h / account.reference_life_h, rel=1e-2)
    alone = math.prod(part.factor_alone for part in account.parts if part.factor_alone is not None)
    assert alone * account.interaction == pytest.approx(account.life_h / account.reference_life_h, rel=1e-9)
    assert [part.name for part in account.parts] == ["load", "dirt", "viscosity", "temperature", "overfill"]


def test_overfill_takes_life_from_the_packed_motor_and_none_from_the_sound_one():
    taken = {
        name: {part.name: part for part in lubecheck.check(lubecheck.load_case(EXAMPLES / f"{name}.toml")).losses.parts}
        for name in ("new_motor", "overfilled_motor")
    }
    assert taken["new_motor"]["overfill"].factor == pytest.approx(1, abs=0.01)
    assert taken["overfilled_motor"]["overfill"].factor < 0.9
    assert taken["overfilled_motor"]["dirt"].factor_alone < 1


@pytest.mark.parametrize("lies", ["horizontal", "vertical"])
def test_a_housing_filled_as_proposed_for_its_shaft_takes_no_life(lies):
    text = BASE
    for table, key, value in (("duty", "radial_load", '"5 kN"'), ("duty", "speed", '"600 rpm"'),
                              ("surroundings", "orientation", f'"{lies}"'),
                              ("grease", "fill", None),
                              ("grease", "housing_fill", None), ("housing", "void", '"20 cm^3"'),
                              ("housing", "conductance", '"1 W/K"'), ("housing", "kind", None),
                              ("surroundings", "draught", None)):  # fmt: skip
        text = with_key(text, table, key, value)
    account = lubecheck.check(read_case(text)).losses
    (overfill,) = [part for part in account.parts if part.name == "overfill"]
    assert (overfill.factor, overfill.factor_alone) == pytest.approx((1.0, 1.0), abs=1e-12)
    product = math.prod(part.factor for part in account.parts)
    assert product == pytest.approx(account.life_h / account.reference_life_h, rel=1e-9)


def test_a_life_that_is_not_known_has_no_loss_account_and_the_record_stays_strict():
    result = lubecheck.check(read_case(with_key(BASE, "duty", "radial_load", '"28 kN"')))
    assert result.losses.life_h is None
    record = json.loads(to_json(result), parse_constant=pytest.fail)
    assert record["losses"]["life_h"] is None
    assert record["damage"][0]["life_h"] is None
