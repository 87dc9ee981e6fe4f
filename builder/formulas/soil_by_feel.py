"""Texture by hand: a short path of questions, after Thien (1979), to a class and its water.

A hand cannot tell silt from silt loam, so the path never ends in silt.
"""

from collections.abc import Mapping, Sequence
from typing import Any

from builder.formulas.refusal import RefusedError, need_percent
from builder.formulas.soil_water import Water, layer_water_mm, mineral_water
from builder.formulas.texture import class_centre

FEEL_PATH: Mapping[str, Mapping[str, str]] = {
    "ball": {"no": "=sand", "yes": "ribbon"},
    "ribbon": {"none": "=loamy sand", "short": "feel_short", "middle": "feel_middle",
               "long": "feel_long"},
    "feel_short": {"gritty": "=sandy loam", "smooth": "=silt loam", "neither": "=loam"},
    "feel_middle": {"gritty": "=sandy clay loam", "smooth": "=silty clay loam",
                    "neither": "=clay loam"},
    "feel_long": {"gritty": "=sandy clay", "smooth": "=silty clay", "neither": "=clay"},
}  # fmt: skip
"""Question -> answer -> next question, or "=class". A short ribbon breaks before 2.5 cm,
a middle one before 5 cm."""


def feel_step(answers: Mapping[str, str]) -> tuple[str | None, str | None]:
    """Where the hand test stands: (next question or None, class or None).

    answers  answer by question: "ball" yes/no, "ribbon" none/short/middle/long,
             "feel_short", "feel_middle", "feel_long" gritty/smooth/neither

    Refused: an answer the question does not have.
    Source: thien_1979; golden: soil_by_feel.json
    """
    question = "ball"
    while question in answers:
        choices = FEEL_PATH[question]
        if answers[question] not in choices:
            raise RefusedError("unknown_choice", field=question, value=answers[question])
        there = choices[answers[question]]
        if there.startswith("="):
            return None, there[1:]
        question = there
    return question, None


def feel_water(texture: str, organic_matter_pct: float) -> Water:
    """Water held by a layer whose class was felt: the middle of the class stands for it.

    texture             class name, from `feel_step`
    organic_matter_pct  by weight [%], at most 8

    A class is wide: two soils of one class can differ by a third in water held.
    Source: saxton_rawls_2006; golden: soil_by_feel.json
    """
    sand, clay = class_centre(texture)
    return mineral_water(sand, clay, organic_matter_pct)


def pit_water_mm(layers: Sequence[Mapping[str, Any]]) -> list[float]:
    """Water plants can take from each layer of a pit that was felt. [mm]

    layers  rows from the surface down: texture, thickness_cm, and where known
            organic_matter_pct (else 1) and stones_vol_pct (else 0)

    Refused: no layer, a class the hand test does not have.
    Source: saxton_rawls_2006; golden: soil_by_feel.json
    """
    if not layers:
        raise RefusedError("layers_missing")
    return [
        layer_water_mm(
            layer["thickness_cm"],
            feel_water(layer["texture"], _or(layer.get("organic_matter_pct"), 1.0)).available,
            need_percent("stones_vol_pct", _or(layer.get("stones_vol_pct"), 0.0)) / 100,
        )
        for layer in layers
    ]


def _or(value: float | None, usual: float) -> float:
    return usual if value is None else value
