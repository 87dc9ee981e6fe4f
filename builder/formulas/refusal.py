"""The one way a formula says no: a sentence for people and a key for the words files."""

import math
from collections.abc import Sequence

SENTENCES = {
    "not_a_number": "{field} must be a number; this is {value}.",
    "negative": "{field} cannot be below zero; this is {value}.",
    "not_above_zero": "{field} must be more than zero; this is {value}.",
    "not_a_share": "{field} must lie between 0 and 1 (85 % is 0.85); this is {value}.",
    "share_of_nothing": "{field} must be more than 0 and at most 1 (85 % is 0.85);"
    " this is {value}.",
    "germination_over_all": "Germination and dormant seed together are {value}; they cannot"
    " be more than all the seed.",
    "two_viabilities": "Give germination with dormant seed, or a tetrazolium result, not both.",
    "not_a_percent": "{field} must lie between 0 and 100; this is {value}.",
    "latitude": "Latitude must lie between -90 and 90 degrees; this is {value}.",
    "latitude_of_equation": "This heat-load equation holds from {low} to {high} degrees"
    " north; this is {value}.",
    "aspect": "Aspect must lie between 0 and 360 degrees; this is {value}.",
    "aspect_on_flat": "Flat ground has no aspect; leave it empty or give the slope.",
    "aspect_missing": "A slope of {value} degrees needs an aspect.",
    "slope": "Slope must lie between 0 and 90 degrees; this is {value}.",
    "slope_of_equation": "This heat-load equation holds for slopes up to 60 degrees;"
    " this is {value}.",
    "day_of_year": "The day of the year must be a whole number from 1 to 366; this is {value}.",
    "twelve_months": "{field} needs twelve months; there are {value}.",
    "tmax_below_tmin": "The month's high ({tmax_c}) lies below its low ({tmin_c}).",
    "soil_sum": "Sand, silt and clay must add up to 100; they add up to {value}.",
    "organic_matter_too_high": "The mineral-soil equation holds up to {limit} % organic matter;"
    " this layer has {value}.",
    "clay_too_high": "The mineral-soil equation holds up to {limit} % clay; this layer has"
    " {value}.",
    "density_factor": "The density factor must lie between 0.9 and 1.3; this is {value}.",
    "packed_too_far": "This soil cannot be packed {value} times: at field capacity its water would"
    " need more than all its pores.",
    "layer_order": "A layer must end below its start; this one runs from {top_cm} to"
    " {bottom_cm} cm.",
    "layers_missing": "There is no soil layer to work with.",
    "layer_gap": "The layers must follow each other without gap or overlap; look at {value} cm.",
    "peat_class_missing": "No peat class holds squeeze class {value}.",
    "layer_water_missing": "A peaty mineral layer needs its stated field capacity and"
    " wilting point.",
    "wilting_over_capacity": "Wilting point ({wilting_point}) lies above field capacity"
    " ({field_capacity}).",
    "unknown_choice": "{field} has no choice called {value}.",
    "same_length": "{field} and {other} must be lists of the same length.",
    "no_plots": "There are no plots yet.",
    "no_points": "There are no points yet.",
    "one_plot": "One plot shows no spread; at least {least} are needed.",
    "no_spread": "All estimates are alike, so no line can be fitted through them.",
    "zero_mean": "The mean is zero, so nothing can be said relative to it.",
    "more_than_all": "{field} ({value}) cannot be more than {limit}.",
    "shares_sum": "{field} must add up to 1; they add up to {value}.",
    "mix_empty": "The mix is empty.",
    "method_not_usable": "This region gives no rate for {value}.",
    "double_allowance": "The share {value} was already taken off this standard; it counts once.",
    "one_standard": "Give a standard or the plots of a reference area, one of the two.",
    "confidence": "{field} must lie between 0 and 1, ends left out; this is {value}.",
    "probabilities_empty": "There is no zone to weigh.",
    "not_whole": "{field} must be a whole number; this is {value}.",
    "class_missing": "The scale has no class {value}.",
    "dry_over_green": "The dry weight ({dry}) lies above the green weight ({green}).",
    "date": "{field} must be a date written like 2026-07-04; this is {value}.",
    "future_date": "{field} lies in the future: {value}.",
}


class RefusedError(ValueError):
    """A value no formula may work with. `key` names its sentence, `values` fill it."""

    def __init__(self, key: str, **values: object) -> None:
        super().__init__(SENTENCES[key].format(**values))
        self.key = key
        self.values = values


def need_number(field: str, value: float | None) -> float:
    """`value` as a float; refused when it is missing, NaN or infinite."""
    if value is None or isinstance(value, (bool, str)) or not math.isfinite(value):
        raise RefusedError("not_a_number", field=field, value=value)
    return float(value)


def need_not_negative(field: str, value: float | None) -> float:
    """`value` as a float of zero or more."""
    number = need_number(field, value)
    if number < 0:
        raise RefusedError("negative", field=field, value=value)
    return number


def need_above_zero(field: str, value: float | None) -> float:
    """`value` as a float above zero."""
    number = need_number(field, value)
    if number <= 0:
        raise RefusedError("not_above_zero", field=field, value=value)
    return number


def need_share(field: str, value: float | None) -> float:
    """`value` as a share from 0 to 1, ends included."""
    number = need_number(field, value)
    if not 0 <= number <= 1:
        raise RefusedError("not_a_share", field=field, value=value)
    return number


def need_some_share(field: str, value: float | None) -> float:
    """`value` as a share above 0 and at most 1, for what is divided by."""
    number = need_number(field, value)
    if not 0 < number <= 1:
        raise RefusedError("share_of_nothing", field=field, value=value)
    return number


def need_percent(field: str, value: float | None) -> float:
    """`value` as a percentage from 0 to 100."""
    number = need_number(field, value)
    if not 0 <= number <= 100:
        raise RefusedError("not_a_percent", field=field, value=value)
    return number


def need_open_share(field: str, value: float | None) -> float:
    """`value` strictly between 0 and 1: an alpha, a confidence, a probability."""
    number = need_number(field, value)
    if not 0 < number < 1:
        raise RefusedError("confidence", field=field, value=value)
    return number


def need_count(field: str, value: float | None) -> int:
    """`value` as a whole number of zero or more."""
    number = need_not_negative(field, value)
    if number != int(number):
        raise RefusedError("not_whole", field=field, value=value)
    return int(number)


def need_months(field: str, values: Sequence[float]) -> list[float]:
    """Twelve finite numbers, January first."""
    if len(values) != 12:
        raise RefusedError("twelve_months", field=field, value=len(values))
    return [need_number(field, value) for value in values]


def need_same_length(
    field: str, values: Sequence[object], other: str, others: Sequence[object]
) -> None:
    """Refuse two lists that do not pair up."""
    if len(values) != len(others):
        raise RefusedError("same_length", field=field, other=other)
