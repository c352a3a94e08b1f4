"""Designations as people write them, with the suffixes of the trade."""

import contextlib

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.data import bearings
from lubecheck.errors import InputError

WAYS = ["6309", " 6309 ", "63 09", "63-09", "63.09", "6309.", "6309-"]


@pytest.mark.parametrize("text", WAYS)
def test_spaces_dots_and_hyphens_do_not_matter(text):
    found = bearings.find(text)
    assert (found.family, found.bore, found.outside, found.unread) == ("deep groove ball", 45, 100, ())


@pytest.mark.parametrize("text", ["NU310", "nu 310", "NU-310", "Nu.310", "NU 3 10"])
def test_letters_and_case_do_not_matter(text):
    found = bearings.find(text)
    assert (found.designation, found.family, found.outside) == ("NU 310", "cylindrical roller", 110)


@pytest.mark.parametrize(
    ("text", "read"),
    [
        ("6309 C3", {"clearance": "C3"}),
        ("6309-2Z/C3", {"clearance": "C3", "seal": "shields", "sealed_sides": 2}),
        ("6309ZZC3", {"clearance": "C3", "seal": "shields", "sealed_sides": 2}),
        ("6309-Z", {"seal": "shields", "sealed_sides": 1}),
        ("6309 2RS", {"seal": "contact seals", "sealed_sides": 2}),
        ("6309-2RS1", {"seal": "contact seals", "sealed_sides": 2, "clearance": "CN"}),
        ("6309LLU/C4", {"seal": "contact seals", "clearance": "C4"}),
        ("6309.2RSR.C3", {"seal": "contact seals", "clearance": "C3"}),
        ("6309 RS", {"seal": "contact seals", "sealed_sides": 1}),
        ("6309 P63", {"clearance": "C3"}),
        ("6309 P6", {"clearance": "CN"}),
        ("6309 M", {"cage": "brass"}),
        ("6309 MA/C2", {"cage": "brass", "clearance": "C2"}),
        ("6309 J", {"cage": "steel"}),
        ("6309 TN9", {"cage": "polyamide"}),
        ("6309 TVP2 C3", {"cage": "polyamide", "clearance": "C3"}),
        ("6309 C3 S1", {"clearance": "C3", "stabilised_to": 200.0}),
        ("6309 S0", {"stabilised_to": 150.0}),
        ("NU 2210 ECP", {"cage": "polyamide"}),
        ("NU 2210 ECML/C3", {"cage": "brass", "clearance": "C3"}),
        ("NJ 310 ECJ", {"cage": "steel"}),
        ("NU 310 E TVP2", {"cage": "polyamide"}),
        ("22218 EK/C3", {"clearance": "C3", "family": "spherical roller"}),
        ("22218 CCK/W33", {"clearance": "CN", "cage": None}),
        ("22218 EMW33C3", {"clearance": "C3", "cage": "brass"}),
        ("30213 J2/Q", {"family": "tapered roller", "cage": None}),
        ("7309 B", {"contact_angle": 40.0, "load_rule": "angular contact 40"}),
        ("7309BECBP", {"contact_angle": 40.0, "cage": "polyamide"}),
        ("7309 BEY", {"contact_angle": 40.0, "cage": "brass"}),
        ("7205 AC", {"contact_angle": 25.0, "load_rule": "angular contact 25"}),
        ("7205 A", {"contact_angle": 30.0, "load_rule": "angular contact 30"}),
        ("7205 C/P4", {"contact_angle": 15.0, "load_rule": "angular contact 15"}),
        ("7010 CDGA/P4A", {"contact_angle": 15.0}),
        ("7309 C3 A", {"contact_angle": 40.0, "clearance": "C3"}),  # an angle stands first, else it is not one
        ("1210 EKTN9", {"cage": "polyamide", "family": "self-aligning ball"}),
        ("NA 4910", {"family": "needle roller"}),
        ("QJ 212 N2MA", {"family": "four-point contact ball", "cage": "brass"}),
        ("NJ 2310 VH", {"family": "full complement cylindrical roller", "cage": "full complement"}),
        ("SL18 3010", {"family": "full complement cylindrical roller", "cage": "full complement", "bore": 50.0}),
        ("NCF 2914 V", {"family": "full complement cylindrical roller", "cage": "full complement"}),
        ("6809", {"bore": 45.0, "outside": 58.0}),
        ("6909 ZZ", {"bore": 45.0, "outside": 68.0, "seal": "shields"}),
    ],
)
def test_suffixes_are_read(text, read):
    found = bearings.find(text)
    assert {key: getattr(found, key) for key in read} == read
    assert found.unread == ()


@pytest.mark.parametrize(
    ("text", "unread", "read"),
    [
        ("6205/VA405", ("VA405",), {"cage": None, "clearance": "CN"}),
        ("6309-2RS1/C3GJN", ("GJN",), {"clearance": "C3", "seal": "contact seals"}),
        ("NU 2210 ECML/C3VA301", ("VA301",), {"clearance": "C3", "cage": "brass"}),
        ("22218 E1-XL-K-C3", ("XL",), {"clearance": "C3", "cage": None}),
        ("7205 CTA", ("TA",), {"contact_angle": 15.0}),
        ("S6205", ("S",), {"bore": 25.0}),
        ("6309 2RS1 HT22", ("HT22",), {"seal": "contact seals"}),
        ("7010 CD/P4ADBA", ("back-to-back pair",), {"contact_angle": 15.0, "arrangement": "single", "rows": 1}),
    ],
)
def test_what_is_not_understood_is_named(text, unread, read):
    found = bearings.find(text)
    assert found.unread == unread
    assert {key: getattr(found, key) for key in read} == read


@pytest.mark.parametrize(
    ("text", "near"),
    [
        ("6333", "6334"),
        ("6400", "6403"),
        ("UN 310", "NU 310"),
        ("NU 333", "NU 332"),
        ("NJ 333", "NJ 334"),
        ("NA 6309", "NA 6909"),
    ],
)
def test_a_designation_of_no_series_gets_the_nearest_that_are(text, near):
    with pytest.raises(InputError) as refused:
        bearings.find(text)
    (fault,) = refused.value.faults
    assert fault.key == "designation"
    assert text in fault.given
    assert near in (fault.nearest or "").split(", ")
    for name in (fault.nearest or "").split(", "):
        assert bearings.find(name)


@pytest.mark.parametrize(
    "text", ["", "   ", "bearing", "0", "12", "6", "63", "6309" * 40, "63\N{SUPERSCRIPT TWO}9", "NU"]
)
def test_what_is_no_designation_is_refused_in_one_fault(text):
    with pytest.raises(InputError) as refused:
        bearings.find(text)
    assert len(refused.value.faults) == 1
    assert "\n" not in str(refused.value)


@given(st.text(max_size=30))
def test_no_text_breaks_the_reader(text):
    with contextlib.suppress(InputError):
        found = bearings.find(text)
        assert found.bore < found.outside


@given(st.sampled_from(bearings.designations()), st.text(max_size=12))
def test_a_known_base_with_any_suffix_is_found_or_refused_and_never_another_size_of_its_own(base, tail):
    found = bearings.find(base)
    try:
        again = bearings.find(f"{base} {tail}")
    except InputError:
        return
    if not tail.strip(" .-/")[:1].isdigit():
        assert (again.bore, again.outside) == (found.bore, found.outside)


def test_every_listed_designation_is_found_as_itself():
    for name in bearings.designations():
        found = bearings.find(name)
        assert found.designation == name
        assert found.unread == ()
