"""A plant of a mix has a seed count and a planning PLS, and a mix says how it is sown.

Passes: seed.yaml mixes/lower/plants: {lower_grass: 200}
Fails: seed.yaml mixes/lower/plants: {lower_shrub: 200}
Fails: seed.yaml mixes/wet/method: drilled
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "seed-counts"
NEEDS = ("seed", "plants", "region")


def check(loaded: Loaded) -> Iterator[Problem]:
    """Mix plants that cannot be weighed out, methods that do not fit the mix or the region."""
    region = loaded.partial
    if region is None:
        return
    by_id = {plant.id: plant for plant in region.plants}
    for zone_id, mix in region.mixes.items():
        for plant_id in mix.plants:
            plant = by_id.get(plant_id)
            if plant is None:
                continue
            for name in ("seeds_per_g", "planning_pls"):
                if not getattr(plant, name):
                    yield problem_at(
                        mix.key_place("plants", plant_id),
                        ID,
                        f"{plant_id} is sown in {zone_id} and has no {name}",
                        f"Add {name} to the plant in plants.yaml.",
                    )
        if (mix.method == "none") == bool(mix.plants):
            wrong = "sows plants by no method" if mix.plants else "sows nothing"
            yield problem_at(
                mix.place("method"),
                ID,
                f"the mix of {zone_id} {wrong}",
                "method: none goes with no plants, and only with none.",
            )
        elif mix.method != "none" and not region.seeding_methods.get(mix.method):
            yield problem_at(
                mix.place("method"),
                ID,
                f"{mix.method} has no factor among the seeding methods",
                "Add it to seeding_methods in region.yaml.",
            )
        if not mix.plants and not mix.live_plants and not mix.propagules:
            yield problem_at(
                mix.at,
                ID,
                f"nothing is sown, planted or spread in {zone_id}",
                "Add plants, live_plants or propagules.",
            )
        for propagule in mix.propagules:
            low, high = propagule.rate_low, propagule.rate_high
            if low is not None and high is not None and low > high:
                yield problem_at(
                    propagule.place("rate_low"),
                    ID,
                    f"the rate of {propagule.kind} in {zone_id} is upside down",
                    "rate_low is the smaller number.",
                )
