"""A group to stop at has two members or more, each once; a deadly group is said to be deadly.

Passes: plants.yaml groups/0/members: [lower_grass, upper_grass]
Fails: plants.yaml groups/0/members: [lower_grass]
Fails: plants.yaml groups/0/members: [lower_grass, lower_grass]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "group-members"
NEEDS = ("plants",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Groups too small, members twice, caution groups whose members carry no caution."""
    if loaded.partial is None:
        return
    by_id = {plant.id: plant for plant in loaded.partial.plants}
    for group in loaded.partial.groups:
        if not group.members or (group.use == "answer" and len(group.members) < 2):
            yield problem_at(
                group.place("members"),
                ID,
                f"group {group.id} is too small",
                "A group to stop at needs two plants or more.",
            )
        for position, member in enumerate(group.members):
            if member in group.members[:position]:
                yield problem_at(
                    group.place("members", position),
                    ID,
                    f"{member} stands twice in {group.id}",
                    "Name each once.",
                )
            plant = by_id.get(member)
            if (
                group.use == "caution"
                and plant is not None
                and not any(
                    caution.who == "people" and caution.level != "care"
                    for caution in plant.cautions
                )
            ):
                yield problem_at(
                    group.place("members", position),
                    ID,
                    f"{member} stands in {group.id} but carries no caution for people",
                    "Add who: people and level: deadly or harm to the plant.",
                )
