"""The phone's formulas in a real browser give the builder's digits on random inputs.

Goldens hold both languages to the sources; here 60 draws of every field formula are worked out
in Chromium, from the modules as they are built, and compared with Python to 1e-9.
"""

import dataclasses
import importlib
import math
import random

import pytest

from builder.formulas.refusal import RefusedError
from builder.formulas.water_balance import Snow
from builder.formulas.year import SeasonRule
from builder.site.app_files import APP
from builder.site.slim import slim_script

DRAWS = 60
SAME = 1e-9
RNG = random.Random(20260704)
RULE = dataclasses.asdict(SeasonRule())
SCALE = [
    {"code": code, "low_pct": low, "high_pct": high, "mid_pct": (low + high) / 2}
    for code, low, high in (("T", 0, 1), ("1", 1, 5), ("2", 5, 25), ("3", 25, 60), ("4", 60, 100))
]
CONSTANCY = [{"code": code, "high_pct": 20 * i} for i, code in enumerate("abcde", start=1)]
PEAT = [
    {"von_post": [1, 3], "field_capacity": 0.2, "wilting_point": 0.07},
    {"von_post": [4, 10], "field_capacity": 0.65, "wilting_point": 0.2},
]


def u(low, high):
    return round(RNG.uniform(low, high), RNG.choice((0, 1, 3, 12)))


def some(low, high, least=2, most=25):
    return [RNG.uniform(low, high) for _ in range(RNG.randint(least, most))]


def months(low, high):
    return [u(low, high) for _ in range(12)]


def parts(count):
    draws = [RNG.uniform(0.05, 1) for _ in range(count)]
    return [draw / sum(draws) for draw in draws]


def soil():
    sand, silt, clay = (100 * part for part in parts(3))
    return {"sand_pct": sand, "silt_pct": silt, "clay_pct": clay}


def layers():
    top, rows = 0, []
    for _ in range(RNG.randint(1, 5)):
        bottom = top + RNG.randint(1, 40)
        kind = RNG.choice(["mineral", "mineral", "peat", "organic_mineral"])
        row = {"top_cm": top, "bottom_cm": bottom, "kind": kind, "stones_vol_pct": u(0, 60)}
        row |= soil() | {"organic_matter_pct": u(0, 14), "von_post_h": RNG.randint(1, 10)}
        if kind == "organic_mineral":
            row |= {"field_capacity": u(0.3, 0.6), "wilting_point": u(0.05, 0.3)}
        rows.append(row)
        top = bottom
    return rows


def slope():
    flat = RNG.random() < 0.2
    aspect = None if flat else u(0, 360)
    return {"latitude_deg": u(28, 62), "slope_deg": 0 if flat else u(0.1, 65), "aspect_deg": aspect}


def climate():
    low = months(-20, 15)
    return {
        "latitude_deg": u(-60, 66),
        "tmax_c": [each + RNG.uniform(0, 18) for each in low],
        "tmin_c": low,
    }


def pairs(least=1):
    clipped = some(0, 200, least, 12)
    return {
        "estimated": [max(0.0, each * u(0.6, 1.3)) for each in clipped],
        "clipped": clipped,
        "others": some(0, 200, 0, 30),
        "confidence": u(0.5, 0.99),
    }


def date():
    return f"{RNG.randint(2022, 2026)}-{RNG.randint(1, 12):02d}-{RNG.randint(1, 31):02d}"


def lot():
    row = {"seeds_m2": u(1, 400), "seeds_per_g": u(50, 9000), "origin": RNG.choice(["", "here"])}
    row |= {"purity": RNG.choice([None, u(0.1, 1.05)]), "germination": RNG.choice([None, u(0, 1)])}
    row |= {"dormant": RNG.choice([None, u(0, 0.4)]), "test_date": RNG.choice([None, date()])}
    row |= {"tetrazolium": RNG.choice([None, None, u(0, 1)]), "generic": RNG.random() < 0.2}
    row |= {"noxious": RNG.choice([[], ["hoary cress"]]), "weed_seed": RNG.choice([0, u(0, 0.1)])}
    return row


def order():
    return {
        "lots": [lot() for _ in range(RNG.randint(0, 4))],
        "area_ha": u(0.1, 40) or 1,
        "base_method": RNG.choice(["drilled", "broadcast"]),
        "method": RNG.choice(["drilled", "broadcast", "flown"]),
        "factors": {"drilled": 1, "broadcast": 2, "flown": None},
        "sow_month": RNG.randint(1, 12),
        "window_months": RNG.choice([[], [10, 11, 12]]),
        "today": "2026-07-04",
        "stale_months": 12,
    }


def success_case():
    rule = {
        "null_kind": RNG.choice(["direct", "reverse"]),
        "share": u(0.5, 1),
        "alpha_direct": 0.1,
        "alpha_reverse": 0.2,
        "precision": u(0.05, 0.3) or 0.1,
        "least": RNG.randint(2, 20),
        "years": RNG.choice([None, 5]),
    }
    against = {"standard": u(20, 60)} if RNG.random() < 0.5 else {"reference": some(20, 60)}
    return {"values": some(20, 60, 0), "rule": rule, "years_since": u(0, 9), **against}


def year_of():
    return {**climate(), "precip_mm": months(0, 150), "capacity_mm": u(10, 250), "rule": RULE,
            "water_table_cm": RNG.choice([None, u(-5, 200)])}  # fmt: skip


DRAWN = {
    "rounding.shown": lambda: {
        "value": u(-1e6, 1e6) / RNG.choice((1, 1000)),
        "digits": RNG.randint(0, 6),
    },
    "units.converted": lambda: {
        "value": u(-50, 5000),
        "unit": "lb_acre",
        "to": RNG.choice(["kg_ha", "lb_acre"]),
    },
    "quantiles.t_quantile": lambda: {"share": RNG.uniform(0.001, 0.999), "df": RNG.uniform(1, 200)},
    "quantiles.t_above": lambda: {"t": RNG.uniform(-8, 8), "df": RNG.uniform(1, 200)},
    "quantiles.normal_quantile": lambda: {"share": RNG.uniform(1e-9, 1 - 1e-9)},
    "quantiles.normal_below": lambda: {"z": RNG.uniform(-9, 9)},
    "sample.summary": lambda: {"values": some(-50, 900, 0)},
    "sample.mean_interval": lambda: {"values": some(0, 900), "confidence": RNG.uniform(0.5, 0.99)},
    "sample.plots_in_all": lambda: {
        "mean": u(10, 900),
        "sd": u(0, 400),
        "precision": RNG.uniform(0.05, 0.5),
        "confidence": 0.9,
    },
    "climate.monthly_radiation_mj_m2": lambda: {"latitude_deg": u(-90, 92)},
    "climate.monthly_daylight_h": lambda: {"latitude_deg": u(-90, 90)},
    "climate.hargreaves_months_mm": climate,
    "terrain.heat_load": slope,
    "terrain.slope_deg": lambda: {"slope_pct": u(-5, 300)},
    "terrain.surface_ha": lambda: {"plan_ha": u(0, 90), "slope_pct": u(0, 200)},
    "water_balance.balance": lambda: {
        "water_mm": months(0, 150),
        "demand_mm": months(0, 200),
        "capacity_mm": u(5, 300),
        "linear": RNG.random() < 0.5,
        "start": RNG.choice(["full", "equilibrium"]),
    },
    "water_balance.snow_months": lambda: {
        "rain_mm": months(0, 150),
        "mean_c": months(-15, 25),
        "snow": RULE["snow"],
    },
    "water_balance.dry_months": lambda: {"rain_mm": months(0, 60), "mean_c": months(-15, 30)},
    "texture.texture_class": soil,
    "soil_water.mineral_water": lambda: {
        "sand_pct": u(0, 95),
        "clay_pct": u(0, 65),
        "organic_matter_pct": u(0, 9),
        "density_factor": u(0.85, 1.35),
    },
    "soil_water.profile_water": lambda: {
        "layers": layers(),
        "depth_cm": u(5, 150),
        "peat_classes": PEAT,
    },
    "cover.class_of": lambda: {"cover_pct": u(0, 101), "classes": SCALE},
    "cover.mean_cover_pct": lambda: {
        "codes": [RNG.choice([None, "T", "1", "2", "3", "4"]) for _ in range(RNG.randint(0, 20))],
        "classes": SCALE,
    },
    "cover.constancy_class": lambda: {"constancy_pct": u(0, 100), "classes": CONSTANCY},
    "cover.wilson_interval": lambda: {
        "successes": RNG.randint(0, 30),
        "n": RNG.randint(0, 60),
        "confidence": RNG.uniform(0.5, 0.99),
    },
    "cover.likeness": lambda: {
        "present": {k: u(0, 90) for k in "abcdef"},
        "reference": {k: u(0, 90) for k in "bcdfgh"},
    },
    "clipping.clip_kg_ha": lambda: {
        "green_g": u(-1, 900),
        "plot_m2": u(0, 2),
        "air_dry_share": u(0, 1.05),
        "summed": RNG.randint(0, 6),
    },
    "clipping.reconstructed_kg_ha": lambda: {
        "now_kg_ha": u(0, 3000),
        "ungrazed_share": u(0, 1),
        "growth_done_share": u(0, 1),
    },
    "double_sampling.ratio_estimate": pairs,
    "double_sampling.regression_estimate": pairs,
    "production.year_share": lambda: {
        "rain_share": u(-0.1, 3),
        "rain_response": u(-0.3, 2),
        "warmer_c": u(-3, 3),
        "warmth_response_per_c": u(-0.1, 0.1),
    },
    "production.year_range": lambda: {"centre_kg_ha": u(1, 5000), "spread_cv": u(0, 0.8)},
    "production.mixture_quantile": lambda: {
        "share": RNG.uniform(0.05, 0.95),
        "weights": parts(4),
        "centres_kg_ha": some(50, 5000, 4, 4),
        "spread_cvs": some(0.05, 0.8, 4, 4),
    },
    "seeding.viable_share": lambda: {"germination": u(0, 1), "dormant": u(0, 0.5)},
    "seeding.order_bulk_kg": lambda: {
        "seeds_m2": u(1, 900),
        "seeds_per_g": u(10, 9000),
        "pls_share": u(0, 1),
        "area_ha": u(0, 50),
    },
    "seeding.tag_age_months": lambda: {"test_date": date(), "today": date()},
    "seeding.mix_by_seed_count": lambda: {
        "total_seeds_m2": u(50, 900),
        "seed_shares": parts(3),
        "seeds_per_g": some(20, 9000, 3, 3),
    },
    "success.one_sample": lambda: {
        "values": some(20, 60, 0),
        "line": u(20, 60),
        "alpha": 0.1,
        "null_kind": RNG.choice(["direct", "reverse"]),
        "at_most": RNG.random() < 0.5,
    },
    "success.two_sample": lambda: {
        "values": some(20, 60),
        "reference": some(20, 60),
        "share": u(0.5, 1),
        "alpha": 0.1,
        "null_kind": RNG.choice(["direct", "reverse"]),
    },
    "success.proportion": lambda: {
        "successes": RNG.randint(0, 20),
        "n": 20,
        "line": u(0, 1),
        "alpha": 0.1,
        "null_kind": RNG.choice(["direct", "reverse"]),
    },
    "success_test.success_test": success_case,
    "clip_sheet.clip_sheet": lambda: {
        "green_g": some(0, 400, 0, 12),
        "plot_m2": u(0.1, 2) or 1,
        "air_dry_share": u(0.2, 1),
        "precision": RNG.uniform(0.1, 0.4),
        "confidence": 0.9,
    },
    "seed_order.seed_order": order,
    "topsoil.ledger": lambda: {
        "lifts": [
            {
                "area_ha": u(0.1, 9) or 1,
                "depth_cm": u(5, 60),
                "ec_ds_m": u(0, 14),
                "stones_vol_pct": u(0, 70),
                "stored_months": u(0, 40),
            }
            for _ in range(RNG.randint(0, 4))
        ],
        "swell_share": u(0, 0.4),
        "spread_ha": RNG.choice([None, 2.5]),
        "limits": {"ec_ds_m": 4, "stones_vol_pct": 15, "stored_months": 12, "pile_height_m": 3},
    },
    "year.site_year": year_of,
}

SCRIPT = """
async ([formula, name, drawn]) => {
  const work = (await import(`/core/${formula}.js`))[name];
  return drawn.map((given) => {
    try {
      return { out: formula === 'rounding' ? work(given.value, given.digits) : work(given) };
    } catch (no) {
      if (!(no instanceof RangeError)) throw no;
      return { refused: no.message };
    }
  });
}
"""


@pytest.fixture
def page(browser, serve, tmp_path):
    """A page of an origin that serves the core's modules as they are built."""
    files = {
        f"core/{path.name}": slim_script(path.read_text("utf-8")).encode()
        for path in (APP / "js" / "core").glob("*.js")
    }
    files["index.html"] = b"<!doctype html><title>core</title>"
    phone = browser.phone(tmp_path / "profile")
    phone.page.goto(serve(files).address)
    return phone.page


def camel(name):
    first, *rest = name.split("_")
    return first + "".join(word.capitalize() for word in rest)


def by_the_builder(formula, given):
    module, name = formula.split(".")
    kept = dict(given)
    if module == "year":
        kept["rule"] = SeasonRule(**{**RULE, "snow": Snow(**RULE["snow"])})
    if "snow" in kept:
        kept["snow"] = Snow(**kept["snow"])
    try:
        work = getattr(importlib.import_module(f"builder.formulas.{module}"), name)
        return {"out": plain(work(**kept))}
    except RefusedError as no:
        return {"refused": no.key}


def plain(value):
    if dataclasses.is_dataclass(value):
        return {f.name: plain(getattr(value, f.name)) for f in dataclasses.fields(value)}
    if isinstance(value, dict):
        return {name: plain(each) for name, each in value.items()}
    return [plain(each) for each in value] if isinstance(value, (list, tuple)) else value


def leaves(ours, theirs):
    """Largest relative distance of two results; infinite where their shapes or words differ."""
    if isinstance(ours, dict) and isinstance(theirs, dict) and set(ours) == set(theirs):
        return max((leaves(ours[name], theirs[name]) for name in ours), default=0.0)
    if isinstance(ours, list) and isinstance(theirs, list) and len(ours) == len(theirs):
        return max((leaves(a, b) for a, b in zip(ours, theirs, strict=True)), default=0.0)
    numbers = all(isinstance(x, (int, float)) and not isinstance(x, bool) for x in (ours, theirs))
    if not numbers:
        return 0.0 if ours == theirs else math.inf
    return abs(ours - theirs) / max(1.0, abs(ours))


def disagreements(formula, theirs, drawn):
    """Draws on which browser and builder differ, and how many the builder answered."""
    answered, off = 0, []
    for given, their in zip(drawn, theirs, strict=True):
        ours = by_the_builder(formula, given)
        answered += "out" in ours
        if leaves(ours, their) > SAME:
            off.append((formula, given, ours, their))
    return answered, off


def test_browser_and_builder_agree(page):
    found = []
    for formula, draw in DRAWN.items():
        module, name = formula.split(".")
        drawn = [draw() for _ in range(DRAWS)]
        theirs = page.evaluate(SCRIPT, [module, camel(name), drawn])
        answered, off = disagreements(formula, theirs, drawn)
        assert answered >= DRAWS / 10, formula
        found += off
    assert found == []
    assert len(DRAWN) >= 45


def test_the_comparison_sees_a_difference():
    assert leaves({"out": [1.0]}, {"out": [1.0 + 1e-6]}) > SAME
    assert leaves({"out": "under"}, {"out": "inside"}) == math.inf
    assert leaves({"out": [1.0]}, {"refused": "negative"}) == math.inf
    assert leaves({"out": 1}, {"out": None}) == math.inf
