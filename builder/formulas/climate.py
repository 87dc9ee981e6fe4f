"""Sun, day length, evaporation and lapse: the year's climate at a site.

Radiation after FAO Irrigation and Drainage Paper 56 (Allen et al. 1998),
evaporation after Hargreaves & Samani (1985) and Thornthwaite (1948). A month
stands at its 15th day.
"""

import math
from collections.abc import Sequence

from builder.formulas.refusal import RefusedError, need_months, need_not_negative, need_number

SOLAR_CONSTANT_MJ_M2_MIN = 0.082
MM_PER_MJ_M2 = 0.408
MONTH_DAYS = (31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31)
MID_MONTH_DAY = tuple(sum(MONTH_DAYS[:month]) + 15 for month in range(12))


def _latitude_rad(latitude_deg: float) -> float:
    latitude = need_number("latitude_deg", latitude_deg)
    if not -90 <= latitude <= 90:
        raise RefusedError("latitude", value=latitude_deg)
    return math.radians(latitude)


def _year_angle(day_of_year: int) -> float:
    day = need_number("day_of_year", day_of_year)
    if day != int(day) or not 1 <= day <= 366:
        raise RefusedError("day_of_year", value=day_of_year)
    return 2 * math.pi * day / 365


def sun_distance_factor(day_of_year: int) -> float:
    """Inverse relative distance from earth to sun, FAO-56 Eq. 23. [-]

    Source: fao56; golden: climate.json
    """
    return 1 + 0.033 * math.cos(_year_angle(day_of_year))


def declination_rad(day_of_year: int) -> float:
    """Solar declination, FAO-56 Eq. 24. [rad]

    Source: fao56; golden: climate.json
    """
    return 0.409 * math.sin(_year_angle(day_of_year) - 1.39)


def sunset_hour_angle_rad(latitude_deg: float, day_of_year: int) -> float:
    """Hour angle of sunset, FAO-56 Eq. 25. [rad]

    Beyond the polar circles the sun may not set (pi) or not rise (0): the
    argument of the arc cosine is held to -1..1, which is what those days mean.
    Refused: latitude beyond 90 degrees, no such day.
    Source: fao56; golden: climate.json
    """
    tangents = -math.tan(_latitude_rad(latitude_deg)) * math.tan(declination_rad(day_of_year))
    return math.acos(max(-1.0, min(1.0, tangents)))


def radiation_mj_m2(latitude_deg: float, day_of_year: int) -> float:
    """Extraterrestrial radiation of one day, FAO-56 Eq. 21. [MJ m-2 day-1]

    Source: fao56; golden: climate.json
    """
    latitude, declination = _latitude_rad(latitude_deg), declination_rad(day_of_year)
    sunset = sunset_hour_angle_rad(latitude_deg, day_of_year)
    path = sunset * math.sin(latitude) * math.sin(declination)
    path += math.cos(latitude) * math.cos(declination) * math.sin(sunset)
    whole_day = 24 * 60 / math.pi * SOLAR_CONSTANT_MJ_M2_MIN
    return whole_day * sun_distance_factor(day_of_year) * max(0.0, path)


def evaporation_equivalent_mm(radiation_mj_m2: float) -> float:
    """Water that this radiation could evaporate, FAO-56 Eq. 20. [mm]

    Source: fao56; golden: climate.json
    """
    return MM_PER_MJ_M2 * need_not_negative("radiation_mj_m2", radiation_mj_m2)


def daylight_h(latitude_deg: float, day_of_year: int) -> float:
    """Hours from sunrise to sunset, FAO-56 Eq. 34. [h]

    Source: fao56; golden: climate.json
    """
    return 24 / math.pi * sunset_hour_angle_rad(latitude_deg, day_of_year)


def monthly_radiation_mj_m2(latitude_deg: float) -> list[float]:
    """Extraterrestrial radiation on the 15th of each month. [12 x MJ m-2 day-1]

    Source: fao56; golden: climate.json
    """
    return [radiation_mj_m2(latitude_deg, day) for day in MID_MONTH_DAY]


def monthly_daylight_h(latitude_deg: float) -> list[float]:
    """Day length on the 15th of each month. [12 x h]

    Source: fao56; golden: climate.json
    """
    return [daylight_h(latitude_deg, day) for day in MID_MONTH_DAY]


def hargreaves_mm_day(tmax_c: float, tmin_c: float, radiation_mj_m2: float) -> float:
    """Reference evaporation of a day, Hargreaves & Samani, FAO-56 Eq. 52. [mm day-1]

    tmax_c, tmin_c   mean daily high and low [C]
    radiation_mj_m2  extraterrestrial radiation [MJ m-2 day-1]

    0.0023 (mean + 17.8) sqrt(tmax - tmin) * 0.408 Ra; the mean is half the sum.
    Below a mean of -17.8 C the equation turns negative and the answer is none: 0.
    Refused: a high below its low.
    Source: fao56, hargreaves_1985; golden: climate.json
    """
    high, low = need_number("tmax_c", tmax_c), need_number("tmin_c", tmin_c)
    if high < low:
        raise RefusedError("tmax_below_tmin", tmax_c=tmax_c, tmin_c=tmin_c)
    water = evaporation_equivalent_mm(radiation_mj_m2)
    return max(0.0, 0.0023 * ((high + low) / 2 + 17.8) * math.sqrt(high - low) * water)


def hargreaves_months_mm(
    latitude_deg: float, tmax_c: Sequence[float], tmin_c: Sequence[float]
) -> list[float]:
    """Reference evaporation of each month, from its 15th day. [12 x mm month-1]

    tmax_c, tmin_c  twelve monthly means [C]
    Source: fao56, hargreaves_1985; golden: climate.json
    """
    highs, lows = need_months("tmax_c", tmax_c), need_months("tmin_c", tmin_c)
    sun = monthly_radiation_mj_m2(latitude_deg)
    rows = zip(highs, lows, sun, MONTH_DAYS, strict=True)
    return [hargreaves_mm_day(high, low, light) * days for high, low, light, days in rows]


def heat_index(mean_c: Sequence[float]) -> float:
    """Thornthwaite's yearly heat index from twelve long-term means. [-]

    Months at or below 0 C add nothing.
    Source: thornthwaite_1948; golden: climate.json
    """
    return math.fsum((month / 5) ** 1.514 for month in need_months("mean_c", mean_c) if month > 0)


def thornthwaite_exponent(index: float) -> float:
    """Exponent a of Thornthwaite's curve for a heat index. [-]

    Source: thornthwaite_1948; golden: climate.json
    """
    i = need_not_negative("index", index)
    return float(6.75e-7 * i**3 - 7.71e-5 * i**2 + 1.792e-2 * i + 0.49239)


def thornthwaite_months_mm(
    mean_c: Sequence[float], daylight_hours: Sequence[float], month_length: bool = True
) -> list[float]:
    """Potential evaporation of each month after Thornthwaite. [12 x mm month-1]

    mean_c          twelve long-term means [C]
    daylight_hours  twelve mean day lengths [h]
    month_length    True: 16 (10 T/I)^a (L/12) (days/30); False: without days/30

    The power form is used for warm months too; the separate rule above 26.5 C
    that some codes switch to is not.
    Source: thornthwaite_1948; golden: climate.json
    """
    means = need_months("mean_c", mean_c)
    light = need_months("daylight_hours", daylight_hours)
    index = heat_index(means)
    power = thornthwaite_exponent(index)
    months = []
    for mean, hours, days in zip(means, light, MONTH_DAYS, strict=True):
        plain = 16 * (10 * mean / index) ** power if mean > 0 else 0.0
        months.append(plain * hours / 12 * (days / 30 if month_length else 1))
    return months


def temperature_at_height_c(
    temperature_c: float, from_m: float, to_m: float, change_c_per_km: float = -6.5
) -> float:
    """A temperature carried to another height. [C]

    change_c_per_km  change for each kilometre up [C km-1]; -6.5 is the standard
                     atmosphere, a region gives its own for each month
    Source: lapse_arithmetic; golden: climate.json
    """
    rise_km = (need_number("to_m", to_m) - need_number("from_m", from_m)) / 1000
    change = need_number("change_c_per_km", change_c_per_km)
    return need_number("temperature_c", temperature_c) + change * rise_km


def rain_at_height_mm(rain_mm: float, from_m: float, to_m: float, gain_per_km: float) -> float:
    """A month's rain carried to another height. [mm]

    gain_per_km  growth for each kilometre up, as a share (0.4 is 40 %), compounded
                 so that rain never falls below zero; above -1
    Source: lapse_arithmetic; golden: climate.json
    """
    gain = _above_minus_one(gain_per_km)
    rise_km = (need_number("to_m", to_m) - need_number("from_m", from_m)) / 1000
    return float(need_not_negative("rain_mm", rain_mm) * (1 + gain) ** rise_km)


def _above_minus_one(gain_per_km: float) -> float:
    """The gain as a float above -1, since rain cannot lose more than all of itself."""
    gain = need_number("gain_per_km", gain_per_km)
    if gain <= -1:
        raise RefusedError("not_above_zero", field="1 + gain_per_km", value=1 + gain)
    return gain
