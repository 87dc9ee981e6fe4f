"""Drawings are true to their figures, the same every time, and say in words what they show."""

import math
import re
import xml.etree.ElementTree as ET
from types import SimpleNamespace

import pytest

from builder.drawings import bars, belts, forms, hoops, icon, kites, slope, year
from builder.drawings.ink import PRINT, SCREEN, num, picture
from builder.drawings.rule import cm_rule, inch_rule
from builder.drawings.sprite import sprite

SVG = "{http://www.w3.org/2000/svg}"
NUMBER = re.compile(r"-?\d*\.?\d+")


def zone(name, letter, kind, low, high):
    return SimpleNamespace(
        id=name, letter=letter, kind=kind, band_m=(low, high), centre_m=(low + high) / 2
    )


def slope_of(count, lenses=1):
    letters = "ABCDEFGHJKLMNOPQRSTUV"
    zones = [
        zone(f"z{n}", letters[n % len(letters)], "zonal", 1000 + 100 * n, 1150 + 100 * n)
        for n in range(count)
    ]
    return zones + [
        zone(f"w{n}", "WXYZ"[n % 4], "azonal", 1000 + 150 * n, 1100 + 150 * n)
        for n in range(lenses)
    ]


def dark_share(d, flat=64):
    """Share of the hoop's ground that is dark, by cutting every curve into short straights."""
    total = 0.0
    for part in re.findall(r"M[^M]*", d):
        if "a" in part:
            total += math.pi * hoops.RADIUS**2
            continue
        figures = [float(n) for n in NUMBER.findall(part)]
        start, rest = (figures[0], figures[1]), figures[2:]
        points = [start]
        for n in range(0, len(rest), 4):
            (x0, y0), (cx, cy, x1, y1) = points[-1], rest[n : n + 4]
            for step in range(1, flat + 1):
                t = step / flat
                a, b, c = (1 - t) ** 2, 2 * t * (1 - t), t * t
                points.append((a * x0 + b * cx + c * x1, a * y0 + b * cy + c * y1))
        area = 0.0
        for (x0, y0), (x1, y1) in zip(points, points[1:] + points[:1], strict=True):
            area += x0 * y1 - x1 * y0
        total += -abs(area) / 2 if "a" in d.split("M")[1] else abs(area) / 2
    return total / (math.pi * hoops.RADIUS**2)


@pytest.mark.parametrize("share", [0.001, 0.005, 0.03, 0.15, 0.375, 0.42, 0.5, 0.625, 0.85, 0.975])
@pytest.mark.parametrize("points", [hoops.POINTS, hoops.POINTS_SMALL])
def test_a_hoop_is_dark_by_its_share(share, points):
    assert dark_share(hoops.hoop_path(share, points)) == pytest.approx(share, rel=5e-4)


def test_any_whole_percent_can_be_drawn():
    for percent in range(101):
        found = dark_share(hoops.hoop_path(percent / 100), flat=16)
        assert found == pytest.approx(percent / 100, abs=5e-4)


def test_the_measure_of_hoops_can_fail():
    assert dark_share(hoops.hoop_path(0.15)) != pytest.approx(0.16, rel=5e-4)


def test_patches_lie_inside_the_hoop():
    for part in hoops.hoop_path(0.5).split("M")[1:]:
        figures = [float(n) for n in NUMBER.findall(part)]
        for x, y in zip(figures[::2], figures[1::2], strict=True):
            assert math.hypot(x - 50, y - 50) <= hoops.RADIUS + 0.2


def test_a_share_over_one_is_refused():
    with pytest.raises(ValueError, match="0..1"):
        hoops.hoop_path(15)


def test_each_standard_letter_keeps_its_colour_and_pattern():
    found = belts.belts_of(slope_of(12, 4))
    assert found["z0"].colour == "#ece5d3"
    assert found["z7"].tile == "H"
    assert found["w3"].on_screen_colour() == "var(--belt-z)"
    assert found["w3"].lens
    assert not found["z7"].lens


def test_lightness_falls_upslope_however_many_belts_there_are():
    for count in (4, 12, 21):
        found = belts.belts_of(slope_of(count, 0))
        light = [belts._luminance(belt.colour) for belt in found.values()]
        assert light == sorted(light, reverse=True)


def test_a_lens_stands_above_the_belt_at_its_height():
    zones = [
        zone("low", "A", "zonal", 0, 100),
        zone("high", "B", "zonal", 200, 300),
        zone("wet", "W", "azonal", 100, 200),
        zone("top", "X", "azonal", 500, 600),
    ]
    assert [each.id for each in belts.in_stack_order(zones)] == ["low", "wet", "high", "top"]


def test_marks_stand_out_from_their_belt():
    for colour in (*belts.SLOPE_COLOURS.values(), *belts.WATER_COLOURS.values()):
        belt = belts.Belt("A", colour, "A", False)
        pair = sorted((belts._luminance(colour), belts._luminance(belt.mark)))
        assert (pair[1] + 0.05) / (pair[0] + 0.05) >= 3


def every_drawing(palette):
    zones = slope_of(5, 2)
    found = list(belts.belts_of(zones).values())
    initials = list("JFMAMJJASOND")
    return [
        slope.heights(zones, (900, 1700), "heights", "z2", palette),
        year.year([10] * 12, [5] * 12, {5, 6}, found[0], initials, "year", palette),
        year.months({5, 6}, found[0], initials, "months", palette),
        bars.constancy_bar(0.4, found[0], "bar", palette),
        bars.range_bar((1, 2, 3), 4, ("1", "2", "3"), found[0], "range", palette=palette),
        bars.range_bar(
            (100, 200, 300), 400, ("1", "2", "3"), found[0], "mine",
            this_year=(80, 240), mine=(150, 10, "150 yours"), palette=palette,
        ),
        bars.reasons([("a plant", 3), ("another", -1)], "A", "B", "reasons", palette),
        kites.kite_head(found, palette),
        kites.kite_row([0.1, 0.5, 0, 0.2, 0.9, 0, 1], found, "kite", palette),
        kites.amplitude([0.1, 0.5, 0, 0.2, 0.9, 0, 1], found, "amplitude", palette),
        belts.tab(found[0], palette),
        belts.thumb(found[0], 9, 7, palette),
        belts.edge(found, 148, 3, palette),
        forms.form("shrub", "shrub", palette),
        hoops.hoop(0.2, "hoop", palette),
        icon.icon(),
    ]  # fmt: skip


@pytest.mark.parametrize("palette", [PRINT, SCREEN])
def test_every_drawing_is_sound_has_a_title_and_is_the_same_twice(palette):
    first, second = every_drawing(palette), every_drawing(palette)
    assert first == second
    for drawing in first:
        root = ET.fromstring(drawing)
        assert root.tag == f"{SVG}svg"
        assert (root.findtext(f"{SVG}title") or "").strip()
        assert "nan" not in drawing
        assert "e-0" not in drawing


def test_a_screen_drawing_takes_every_colour_from_the_page():
    for drawing in every_drawing(SCREEN)[:-1]:
        assert not re.findall(r'(?:fill|stroke)="#', drawing)
        assert "style=" not in drawing  # the app's policy forbids it


def test_a_constancy_bar_is_as_long_as_its_share():
    root = ET.fromstring(bars.constancy_bar(0.5, belts.Belt("A", "#ece5d3", "A", False), "", PRINT))
    widths = [float(each.get("width")) for each in root.iter(f"{SVG}rect")]
    assert widths[1] / (widths[0] - 0.24) == pytest.approx(0.5, abs=1e-3)


def test_belts_stand_at_their_true_heights():
    zones = slope_of(4, 0)
    root = ET.fromstring(slope.heights(zones, (1000, 1500), "", None, PRINT, 80, 100))
    boxes = [each for each in root.iter(f"{SVG}rect") if each.get("stroke")]
    tops = [float(each.get("y")) for each in boxes]
    tall = [float(each.get("height")) for each in boxes]
    metre = tall[0] / 150
    for place, each in enumerate(zones):
        assert tops[0] - tops[place] == pytest.approx((each.band_m[1] - 1150) * metre, abs=0.02)
        assert tall[place] == pytest.approx(150 * metre, abs=0.02)


def test_strata_keep_their_order_where_bands_share_one_height():
    zones = [zone(f"z{n}", letter, "zonal", 500, 600) for n, letter in enumerate("ABCD")]
    edges = slope._edges(zones, (400, 700), 40, 140)
    assert edges == sorted(edges, reverse=True)
    assert min(a - b for a, b in zip(edges, edges[1:], strict=False)) > 8


def test_rules_are_true_to_scale():
    ticks = re.findall(r"M\S+ (\S+?)h(-?[\d.]+)", cm_rule(105, 148, -1, "cm"))
    centimetres = [float(y) for y, long in ticks if float(long) == -3.4]
    assert len(centimetres) == 15
    assert centimetres[-1] - centimetres[0] == pytest.approx(140, abs=0.05)
    ticks = re.findall(r"M\S+ (\S+?)h(-?[\d.]+)", inch_rule(0, 148, 1, "in"))
    inches = [float(y) for y, long in ticks if float(long) == 4]
    assert inches[-1] - inches[0] == pytest.approx(5 * 25.4, abs=0.05)


def test_numbers_are_short_and_never_minus_nought():
    assert [num(-0.0001), num(2.50), num(100), num(0.1234, 3)] == ["0", "2.5", "100", "0.123"]


def test_a_picture_keeps_its_title_as_words():
    drawn = picture(bars.constancy_bar(0.4, belts.Belt("A", "#ece5d3", "A", False), "40 of 100"))
    assert 'alt="40 of 100"' in drawn
    assert drawn.count('"') % 2 == 0


def test_the_sprite_holds_every_class_form_and_belt(tables):
    found = sprite(tables.region)
    assert list(found["hoops"]) == [each.code for each in tables.region.cover_scale.classes]
    assert {plant.form for plant in tables.region.plants} <= set(found["forms"])
    assert set(found["belts"]) == set(found["stack"]) == set(tables.region.zone_ids)
    for belt in found["belts"].values():
        assert f'id="{belt["pattern"]}"' in found["patterns"]
