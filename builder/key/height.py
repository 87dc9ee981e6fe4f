"""What height, slope and aspect say about the zones, in whole centibans."""

from __future__ import annotations

import math
from typing import Any

import numpy as np

from builder.key.context import Context
from builder.key.prepare import Floats, Ints, Key, Site
from builder.key.rounding import NATS_PER_CENTIBAN, round_half_up


def height_points(key: Key, site: Site, context: Context) -> Ints:
    """Points per zone: -min((metres outside the band / soft edge)^2 / 2, cap).

    Never more than settings.height.most_cb between two zones; nothing where height is off.
    """
    height = (site.get("place") or {}).get("height_m")
    if height is None or context.height_off:
        return np.zeros(key.zones, np.int32)
    at = np.array([height + context.elevation_shift_m], float)
    points: Ints = height_points_at(key, at, np.array([heat_share(key, site)]))[0]
    return points


def height_points_at(key: Key, height_m: Floats, heat: Floats) -> Ints:
    """Points [site, zone] at heights [m] with heat shares -1..1, both [site]."""
    settings = key.settings["height"]
    points = np.zeros((len(height_m), key.zones), np.int32)
    for z, zone in enumerate(key.pack["zones"]):
        if not zone["band_m"]:
            continue
        low, high = zone["band_m"]
        shift = np.where(heat >= 0, heat * zone["south_shift_m"], -heat * zone["north_shift_m"])
        outside = np.maximum(low + shift - height_m, height_m - (high + shift))
        steps = np.maximum(outside, 0.0) / zone["soft_edge_m"]
        nats = np.minimum(0.5 * steps * steps, settings["cap_nats"])
        points[:, z] = -round_half_up(nats / NATS_PER_CENTIBAN)
    floor = points.max(axis=1, keepdims=True) - int(settings["most_cb"])
    return np.asarray(np.maximum(points, floor), np.int32)


def bands_at(key: Key, heat: float) -> list[tuple[float, float] | None]:
    """Each zone's band moved by its share of the shift on hot or cool ground. [m]"""
    moved: list[tuple[float, float] | None] = []
    for zone in key.pack["zones"]:
        if not zone["band_m"]:
            moved.append(None)
            continue
        shift = heat * zone["south_shift_m"] if heat >= 0 else -heat * zone["north_shift_m"]
        moved.append((zone["band_m"][0] + shift, zone["band_m"][1] + shift))
    return moved


def heat_share(key: Key, site: Site) -> float:
    """Heat load against level ground as a share of the reference slope's: 1 hot, -1 cool."""
    place: dict[str, Any] = site.get("place") or {}
    slope, aspect = place.get("slope_pct"), place.get("aspect_deg")
    if slope is None or aspect is None:
        return 0.0
    heat = key.settings["heat_load"]
    gain = heat_load(heat, slope, aspect) - heat["level"]
    share: float = min(gain / heat["hot"], 1.0) if gain >= 0 else -min(-gain / heat["cool"], 1.0)
    return share


def heat_load(heat: dict[str, float], slope_pct: float, aspect_deg: float) -> float:
    """Yearly heat load. [MJ cm-2 yr-1]

    heat        coefficients and latitude_deg, steepest_deg
    slope_pct   rise over run [percent]; aspect_deg clockwise from north [degrees]

    Source: McCune and Keon (2002), J. Veg. Sci. 13: 603-606, equation 3 (not logged), aspect
    folded about north-east to south-west.
    """
    tilt = min(math.atan(slope_pct / 100.0), math.radians(heat["steepest_deg"]))
    latitude = math.radians(abs(heat["latitude_deg"]))
    turned = aspect_deg + 180.0 if heat["latitude_deg"] < 0 else aspect_deg
    folded = math.radians(abs(180.0 - abs(turned % 360.0 - 225.0)))
    return (
        heat["constant"]
        + heat["cos_l_cos_s"] * math.cos(latitude) * math.cos(tilt)
        + heat["sin_l_sin_s"] * math.sin(latitude) * math.sin(tilt)
        + heat["cos_a_sin_s"] * math.cos(folded) * math.sin(tilt)
    )
