"""Film: the viscosity that a bearing needs, the ratio of what it has to that, and the thickness of the film itself.

Film thickness is the second opinion beside the viscosity ratio: it needs the contact's own geometry, and both lead to
the ratio Lambda of film to roughness.
"""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import Array, Mm, Mm2PerS, MPa, MPaS, MPerS, Newton, Number, PerGPa, Rpm

# E' = 2/((1 - v1^2)/E1 + (1 - v2^2)/E2) of bearing steel on itself, E 206 000 MPa and v 0.3 (common practice)
STEEL_REDUCED_MODULUS = 206_000 / (1 - 0.3**2)  # MPa
# A greased contact runs short of oil: its film over that of the base oil in plenty (handbooks, range 0.5 to 1)
GREASE_STARVATION = 0.7
GREASE_STARVATION_RANGE = (0.5, 1.0)
_CONTACT = {
    "entrainment": (1e-6, 1e3),
    "dynamic_viscosity": (1e-3, 1e7),
    "pressure_coefficient": (0.1, 100.0),
    "radius": (1e-3, 1e5),
    "reduced_modulus": (1e3, 1e6),
    "load": (1e-6, 1e8),
}


@method(source="iso-281:9.3.3.1", valid={"speed": (1e-3, 1e6), "pitch_diameter": (1.0, 1e4)})
def reference_viscosity(speed: Rpm, pitch_diameter: Mm) -> Mm2PerS:
    """Reference kinematic viscosity: the least that separates the surfaces adequately.

    nu_1 = 45000 n^-0.83 Dpw^-0.5 for n < 1000 rpm, 4500 n^-0.5 Dpw^-0.5 from 1000 rpm. The two do not quite meet at
    1000 rpm (they differ by 2 %): the standard prints them so.

    speed [rpm]: speed n of the turning ring, any shape
    pitch_diameter [mm]: pitch diameter Dpw, the mean diameter (d + D)/2 may stand for it, broadcasts with speed
    returns [mm^2/s]

    >>> reference_viscosity("1480 rpm", "72.5 mm").round(2)
    <Quantity(13.74, 'millimeter ** 2 / second')>
    """
    slow = 45000 * np.exp(-0.83 * np.log(speed))
    fast = 4500 * np.exp(-0.5 * np.log(speed))
    return np.where(speed < 1000, slow, fast) / np.sqrt(pitch_diameter)


@method(source="iso-281:9.3.3", valid={"nu": (1e-6, 1e9), "nu_1": (1e-6, 1e9)})
def viscosity_ratio(*, nu: Mm2PerS, nu_1: Mm2PerS) -> Number:
    """Viscosity ratio kappa = nu / nu_1.

    nu [mm^2/s]: kinematic viscosity at the operating temperature, any shape
    nu_1 [mm^2/s]: reference kinematic viscosity, broadcasts with nu
    returns [1]

    >>> viscosity_ratio(nu="27.48 mm^2/s", nu_1="13.74 mm^2/s").round(6)
    <Quantity(2.0, 'dimensionless')>
    """
    return nu / nu_1


@method(source="iso-tr-1281-2", valid={"viscosity_ratio": (1e-6, 1e6)})
def film_parameter(viscosity_ratio: Number) -> Number:
    """Film parameter Lambda, the ratio of film thickness to roughness, that ISO 281 ties to the viscosity ratio.

    kappa = Lambda^1.3, so Lambda = kappa^(1/1.3), for the surface finish of good manufacture.

    viscosity_ratio [1]: kappa, any shape
    returns [1]

    >>> film_parameter(4.0).round(3)
    <Quantity(2.905, 'dimensionless')>
    """
    ratio: Array = np.exp(np.log(viscosity_ratio) / 1.3)
    return ratio


@method(source="hamrock-dowson", valid={**_CONTACT, "ellipticity": (1.0, 100.0)})
def film_thickness_point(
    *,
    entrainment: MPerS,
    dynamic_viscosity: MPaS,
    pressure_coefficient: PerGPa,
    radius: Mm,
    reduced_modulus: MPa,
    load: Newton,
    ellipticity: Number,
) -> tuple[Mm, Mm]:
    """Least and central film thickness of one ball on its raceway: elliptical contact in plenty of oil.

    H_min = 3.63 U^0.68 G^0.49 W^-0.073 (1 - e^(-0.68 k)) and H_c = 2.69 U^0.67 G^0.53 W^-0.067 (1 - 0.61 e^(-0.73 k)),
    with H = h/R, U = eta u/(E' R), G = alpha E', W = w/(E' R^2). Hard contacts that roll across their short axis, not
    heated at the inlet, not starved (for grease see `GREASE_STARVATION`). Measured films agree to about 20 %.

    entrainment [m/s]: mean surface speed u = (u1 + u2)/2, any shape
    dynamic_viscosity [mPa*s]: viscosity eta at the contact's inlet, at ambient pressure, broadcasts
    pressure_coefficient [1/GPa]: pressure-viscosity coefficient alpha, broadcasts
    radius [mm]: reduced radius R in the direction of rolling, broadcasts
    reduced_modulus [MPa]: E' = 2/((1 - v1^2)/E1 + (1 - v2^2)/E2); `STEEL_REDUCED_MODULUS` for steel, broadcasts
    load [N]: load w on the one contact, broadcasts
    ellipticity [1]: k, the contact's axis across rolling over its axis along it, 1 and above, broadcasts
    returns [mm, mm]

    >>> contact = {"entrainment": "3 m/s", "dynamic_viscosity": "20 mPa*s", "pressure_coefficient": "20 1/GPa"}
    >>> body = {"radius": "6 mm", "reduced_modulus": "226 GPa", "load": "500 N", "ellipticity": 7}
    >>> least, central = film_thickness_point(**contact, **body)
    >>> least.to("um").round(3), central.to("um").round(3)
    (<Quantity(0.247, 'micrometer')>, <Quantity(0.308, 'micrometer')>)
    """
    speed = np.log(dynamic_viscosity * entrainment * 1e-6 / (reduced_modulus * radius))
    material = np.log(pressure_coefficient * reduced_modulus * 1e-3)
    pressing = np.log(load / (reduced_modulus * radius**2))
    least = 3.63 * np.exp(0.68 * speed + 0.49 * material - 0.073 * pressing) * (1 - np.exp(-0.68 * ellipticity))
    central = 2.69 * np.exp(0.67 * speed + 0.53 * material - 0.067 * pressing)
    central = central * (1 - 0.61 * np.exp(-0.73 * ellipticity))
    return radius * least, radius * central


@method(source="hamrock-dowson", valid={**_CONTACT, "length": (1e-3, 1e4)})
def film_thickness_line(
    *,
    entrainment: MPerS,
    dynamic_viscosity: MPaS,
    pressure_coefficient: PerGPa,
    radius: Mm,
    reduced_modulus: MPa,
    load: Newton,
    length: Mm,
) -> Mm:
    """Least film thickness of one roller on its raceway: line contact in plenty of oil (Dowson 1968).

    H_min = 2.65 U^0.7 G^0.54 W^-0.13, with H = h/R, U = eta u/(E' R), G = alpha E', W = w/(E' R L). Limits as for
    `film_thickness_point`.

    entrainment [m/s]: mean surface speed u = (u1 + u2)/2, any shape
    dynamic_viscosity [mPa*s]: viscosity eta at the contact's inlet, at ambient pressure, broadcasts
    pressure_coefficient [1/GPa]: pressure-viscosity coefficient alpha, broadcasts
    radius [mm]: reduced radius R in the direction of rolling, broadcasts
    reduced_modulus [MPa]: E' = 2/((1 - v1^2)/E1 + (1 - v2^2)/E2); `STEEL_REDUCED_MODULUS` for steel, broadcasts
    load [N]: load w on the one contact, broadcasts
    length [mm]: length L of the contact, broadcasts
    returns [mm]

    >>> contact = {"entrainment": "3 m/s", "dynamic_viscosity": "20 mPa*s", "pressure_coefficient": "20 1/GPa"}
    >>> body = {"radius": "6 mm", "reduced_modulus": "226 GPa", "load": "2 kN", "length": "12 mm"}
    >>> film_thickness_line(**contact, **body).to("um").round(3)
    <Quantity(0.273, 'micrometer')>
    """
    speed = np.log(dynamic_viscosity * entrainment * 1e-6 / (reduced_modulus * radius))
    material = np.log(pressure_coefficient * reduced_modulus * 1e-3)
    pressing = np.log(load / (reduced_modulus * radius * length))
    thickness: Array = radius * 2.65 * np.exp(0.7 * speed + 0.54 * material - 0.13 * pressing)
    return thickness
