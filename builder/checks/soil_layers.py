"""Soil layers begin at 0 and follow without gaps; texture adds to 100; peat has its class.

Passes: soils.yaml soils/lower/layers/1/top_cm: 20
Fails: soils.yaml soils/lower/layers/1/top_cm: 25
Fails: soils.yaml soils/lower/layers/0/sand_pct: 50
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import CAUTION, Problem, problem_at
from builder.tables import Layer, Loaded, Region, Soil

ID = "soil-layers"
NEEDS = ("soils",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Gaps, sums, and layers that miss what their kind of water needs."""
    region = loaded.partial
    if region is None:
        return
    for zone_id, soil in region.soils.items():
        yield from _depths(zone_id, soil)
        for layer in soil.layers:
            yield from _texture(zone_id, layer)
            yield from _water(zone_id, layer, region)


def _depths(zone_id: str, soil: Soil) -> Iterator[Problem]:
    edge = 0.0
    for layer in soil.layers:
        if layer.top_cm != edge:
            word = "a gap" if layer.top_cm > edge else "an overlap"
            yield problem_at(
                layer.place("top_cm"),
                ID,
                f"{word} between {edge:g} and {layer.top_cm:g} cm in {zone_id}",
                f"The layer begins where the one above ends: top_cm: {edge:g}.",
            )
        if layer.bottom_cm <= layer.top_cm:
            yield problem_at(
                layer.place("bottom_cm"),
                ID,
                f"a layer of {zone_id} ends at {layer.bottom_cm:g} cm above its top",
                "top_cm is the smaller number.",
            )
        edge = layer.bottom_cm
    if soil.layers and soil.rooting_depth_cm > edge:
        yield problem_at(
            soil.place("rooting_depth_cm"),
            ID,
            f"roots of {zone_id} reach {soil.rooting_depth_cm:g} cm, the layers end at {edge:g} cm",
            "Add the layer below, or lessen the depth.",
            CAUTION,
        )
    if soil.water_table_cm is not None:
        wettest, usual, driest = soil.water_table_cm
        if not wettest <= usual <= driest:
            yield problem_at(
                soil.place("water_table_cm"),
                ID,
                f"the water table of {zone_id} is out of order",
                "Write [wettest, usual, driest] depths; standing water is negative.",
            )


def _texture(zone_id: str, layer: Layer) -> Iterator[Problem]:
    parts = (layer.sand_pct, layer.silt_pct, layer.clay_pct)
    if layer.kind == "mineral":
        if None in parts:
            yield problem_at(
                layer.at,
                ID,
                f"a mineral layer of {zone_id} has no texture",
                "Add sand_pct, silt_pct and clay_pct, or kind: peat.",
            )
        elif abs(sum(part or 0.0 for part in parts) - 100) > 0.5:
            total = sum(part or 0.0 for part in parts)
            yield problem_at(
                layer.place("sand_pct"),
                ID,
                f"sand, silt and clay of a layer of {zone_id} add to {total:g}",
                "They add to 100.",
            )
    elif any(part is not None for part in parts):
        yield problem_at(
            layer.at,
            ID,
            f"a layer of {zone_id} is {layer.kind} and has sand, silt or clay",
            "Texture is not defined there; take it out.",
        )


def _water(zone_id: str, layer: Layer, region: Region) -> Iterator[Problem]:
    if layer.kind == "peat":
        known = region.files["soils"].peat_classes
        if layer.von_post_h is None:
            yield problem_at(
                layer.at,
                ID,
                f"a peat layer of {zone_id} has no von_post_h",
                "Add the squeeze class, 1 to 10.",
            )
        elif not any(c.von_post[0] <= layer.von_post_h <= c.von_post[1] for c in known):
            yield problem_at(
                layer.place("von_post_h"),
                ID,
                f"H{layer.von_post_h} of {zone_id} is in no peat class",
                "Add the class to peat_classes.",
            )
    if layer.kind == "organic_mineral" and None in (layer.field_capacity, layer.wilting_point):
        yield problem_at(
            layer.at,
            ID,
            f"a layer of {zone_id} is organic_mineral and states no water held",
            "Add field_capacity and wilting_point; no equation serves it.",
        )
    dry, held, full = layer.wilting_point, layer.field_capacity, layer.saturation
    if dry is not None and held is not None and not dry < held <= (full or 1):
        yield problem_at(
            layer.place("field_capacity"),
            ID,
            f"water held by a layer of {zone_id} is out of order",
            "wilting_point, field_capacity and saturation rise in this order.",
        )
