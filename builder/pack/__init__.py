"""A region compiled: one file of figures, one of texts per language, same tables same bytes.

pack.json (no sentences; canonical JSON: keys sorted, no spaces, whole numbers where they are
whole). Its hash is the first 16 hex digits of SHA-256.

    format 1
    region       id, edition, date, latitude_deg, elevation_m, units, invented, languages,
                 address, sensitive_rounding_deg, plots_behind
    settings     every figure of the method: builder.key.defaults.SESSION and temper,
                 area_cb [zone], heat_load, fit (usual surprise and miss, by plants asked and zone)
    cover        scale_id, classes [code, low_pct, high_pct, mid_pct, step 0..3]
    zones        id, letter, kind, band_m, centre_m, soft_edge_m, shifts, neighbours [index]
    plants       id, form, layer, months, known_when_dry, weed, mix, fate, response, groups and
                 lookalikes [index], price_micronats; true where it holds: caution (deadly or
                 harmful to people), sensitive
    groups       id, use, members [index]
    evidence     plants: by plant a table of 13 rows in short (builder.key.sparse): 0..3 found by
                 cover step less row 4; 4 found; 5..8 not found at v = 1/4..1; 9..11 covers no
                 more than step 0..2; 12 expected presence per 10 000
                 found_share: by plant, cover steps per 1000 where found
                 groups: found [zone] and expected [zone] of "some of these"
                 newcomer: rows [plant, level, half], tables in short, levels
    questions    id, kind, asked, digs_cm, price_micronats, answers [value, share per 10 000,
                 evidence [zone], effect]; rules: id, when, evidence, effect
    disturbances id, notes, dug, disturbs, states, effect
    production, climate, soils, seed, reclaim (windows and standards), success_rule, lapse,
    seeding_methods: the tables' own figures by zone, names as in the tables
    occurrence, season_rule, ground_water_cm, peat_classes, tag_stale_months, topsoil_limits:
                 see builder.pack.sheets
    proof        what known or simulated plots say; tested_on plots or simulated
    probes       [site, answer]: sites with the builder's own answers (builder.key.probes)

Read evidence through builder.key.prepare (or core/prepare.js), never by hand.
texts.<language>.json: see builder.pack.texts.
"""

from builder.pack.compile import compile_pack, pack_bytes, pack_hash, texts_bytes
from builder.pack.texts import compile_texts

__all__ = ["compile_pack", "compile_texts", "pack_bytes", "pack_hash", "texts_bytes"]
