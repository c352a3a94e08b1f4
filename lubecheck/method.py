"""One body, two faces: the decorator that every physics function is declared with.

The body is written once, on float64 arrays in house units. Its annotations (`Mm`, `Rpm`, ... of `units`) declare
what each argument and the return are, and from them two faces come: `f.plain(...)` is the body itself, which the
kernel calls; `f(...)` is the unit-aware face, which takes quantities or texts with units, checks them all, and
returns a quantity. The source and the range of validity are data on the function, so that docs, verdict and
explanation read the same entry. A declaration without a unit, or a docstring that disagrees with it, fails at import.
"""

from __future__ import annotations

import functools
import inspect
import typing
from collections.abc import Callable, Mapping
from typing import Any, Generic, ParamSpec, TypeVar

import numpy as np

from lubecheck import sources
from lubecheck.errors import ArgumentError, DeclarationError, Fault, OutOfRange, nearest, shown
from lubecheck.units import (
    KINDS,
    Array,
    Choice,
    Unit,
    UnreadableText,
    example,
    is_quantity,
    quantity,
    quantity_to_house,
    read_text,
)

P = ParamSpec("P")
R = TypeVar("R")
Declared = Unit | Choice


class Method(Generic[P, R]):
    """A physics function with its two faces, its source and its range of validity."""

    __name__: str
    plain: Callable[..., R]  # arrays and plain floats alike
    source: str
    valid: Mapping[str, tuple[float, float]]
    arguments: Mapping[str, Declared]
    returns: tuple[Unit, ...]

    def __init__(self, body: Callable[P, R], source: str, valid: Mapping[str, tuple[float, float]]) -> None:
        functools.update_wrapper(self, body)
        self.plain = body
        self.source = source
        self.valid = valid
        self._signature = inspect.signature(body)
        self.arguments, self.returns = _declared(body, self._signature)
        _check(self, self._signature)

    def outside(self, **values: Any) -> Any:
        """Return where any of the named values (house units, arrays or floats) lies outside the range of validity."""
        bad: Any = np.False_
        for name, (low, high) in self.valid.items():
            if name in values:
                value = np.asarray(values[name], dtype=np.float64)
                bad = bad | ~((value >= low) & (value <= high))
        return bad

    @property
    def range_text(self) -> str:
        """The range of validity in words."""
        parts = []
        for name, (low, high) in self.valid.items():
            declared = self.arguments[name]
            unit = declared.name if isinstance(declared, Unit) and declared.name != "1" else ""
            parts.append(f"{name} {low:g} to {high:g} {unit}".rstrip())
        return ", ".join(parts)

    def __call__(self, *args: Any, **kwargs: Any) -> Any:
        """Check and convert the arguments, run the body, return quantities."""
        bound = self._signature.bind(*args, **kwargs)  # a default is in house units already: it is left to the body
        faults: list[Fault] = []
        plain: dict[str, Any] = {}
        for name, value in bound.arguments.items():
            try:
                plain[name] = _read(value, self.arguments[name])
            except UnreadableText as refused:
                faults.append(
                    Fault(name, shown(value), refused.expected, where=f"{self.__name__}()", nearest=refused.near)
                )
        if faults:
            raise ArgumentError(faults)
        if np.any(self.outside(**plain)):
            raise OutOfRange(f"{self.__name__}(): outside its range of validity: {self.range_text}")
        with np.errstate(all="ignore"):
            result: Any = self.plain(**plain)
        results = result if isinstance(result, tuple) else (result,)
        if not all(np.all(np.isfinite(part)) for part in results):
            raise OutOfRange(f"{self.__name__}(): no finite result for these arguments")
        answers = tuple(quantity(_scalar(part), unit.name) for part, unit in zip(results, self.returns, strict=True))
        return answers if isinstance(result, tuple) else answers[0]


def method(
    *, source: str, valid: Mapping[str, tuple[float, float]] | None = None
) -> Callable[[Callable[P, R]], Method[P, R]]:
    """Declare a physics function: its source key, and the range of validity of its arguments in house units."""

    def declare(body: Callable[P, R]) -> Method[P, R]:
        return Method(body, source, valid or {})

    return declare


def _scalar(value: Any) -> float | Array:
    array = np.asarray(value, dtype=np.float64)
    return float(array) if array.ndim == 0 else array


def _read(value: Any, declared: Declared) -> Any:
    """Return one argument in the form that the plain face takes."""
    if isinstance(declared, Choice):
        return _read_choice(value, declared)
    kind = KINDS[declared.kind]
    if is_quantity(value):
        array = quantity_to_house(value, kind)
    elif isinstance(value, str):
        array = np.asarray(read_text(value, kind))
    elif isinstance(value, (list, tuple)) and any(isinstance(item, str) or is_quantity(item) for item in value):
        array = np.array([_read(item, declared) for item in value])
    elif kind.is_bare and not isinstance(value, bool):
        try:
            array = np.asarray(value, dtype=np.float64)
        except (TypeError, ValueError) as refused:
            raise UnreadableText(example(kind)) from refused
    else:
        raise UnreadableText(example(kind))
    if not np.all(np.isfinite(array)):
        raise UnreadableText(f"{example(kind)}, finite")
    return array


def _read_choice(value: Any, declared: Choice) -> Any:
    words = value if isinstance(value, (list, tuple)) or (hasattr(value, "dtype")) else [value]
    for word in words:
        if word not in declared.words:
            near = nearest(word, declared.words) if isinstance(word, str) else None
            raise UnreadableText("one of " + ", ".join(declared.words), near)
    codes = np.array([declared.code(str(word)) for word in words], dtype=np.intp)
    return codes if words is value else codes[0]


def _declared(body: Callable[..., Any], signature: inspect.Signature) -> tuple[dict[str, Declared], tuple[Unit, ...]]:
    """Read the units that the annotations of a body declare."""
    hints = typing.get_type_hints(body, include_extras=True)
    arguments: dict[str, Declared] = {}
    for name in signature.parameters:
        declared = next((m for m in getattr(hints.get(name), "__metadata__", ()) if isinstance(m, Declared)), None)
        if declared is None:
            raise DeclarationError(f"{body.__name__}(): argument {name} declares no unit")
        arguments[name] = declared
    parts = typing.get_args(hints.get("return"))
    is_many = typing.get_origin(hints.get("return")) is tuple
    units = []
    for part in parts if is_many else (hints.get("return"),):
        unit = next((m for m in getattr(part, "__metadata__", ()) if isinstance(m, Unit)), None)
        if unit is None:
            raise DeclarationError(f"{body.__name__}(): the return declares no unit")
        units.append(unit)
    return arguments, tuple(units)


def _check(made: Method[..., Any], signature: inspect.Signature) -> None:
    """Refuse a declaration that its docstring, its signature or the bibliography contradicts."""
    name = made.__name__
    sources.cite(made.source)
    for key in made.valid:
        if key not in made.arguments:
            raise DeclarationError(f"{name}(): the range of validity names {key}, which is no argument")
    kinds = [declared.kind for declared in made.arguments.values() if isinstance(declared, Unit)]
    for key, declared in made.arguments.items():
        positional = signature.parameters[key].kind is not inspect.Parameter.KEYWORD_ONLY
        if positional and isinstance(declared, Unit) and declared.name != "1" and kinds.count(declared.kind) > 1:
            raise DeclarationError(f"{name}(): {key} shares its dimension with another argument: make it keyword-only")
    doc = made.__doc__
    if doc is None:  # python -OO drops docstrings; the tests run without it
        return
    for key, declared in made.arguments.items():
        mark = f"{key} [{declared.name}]" if isinstance(declared, Unit) else f"{key}: "
        if mark not in doc:
            raise DeclarationError(f"{name}(): the docstring does not say '{mark}'")
    mark = "returns [" + ", ".join(unit.name for unit in made.returns) + "]"
    if mark not in doc:
        raise DeclarationError(f"{name}(): the docstring does not say '{mark}'")
