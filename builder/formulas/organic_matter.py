"""Stores of organic matter, carbon and nitrogen, and what it takes to build them."""

from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_not_negative,
    need_percent,
    need_share,
    need_some_share,
)


def organic_matter_t_ha(
    organic_matter_pct: float,
    bulk_density_g_cm3: float,
    depth_cm: float,
    stones_share: float = 0.0,
) -> float:
    """Organic matter in a layer. [t ha-1]

    organic_matter_pct  by weight of fine earth [%]
    bulk_density_g_cm3  of the fine earth [g cm-3];  depth_cm  thickness [cm]
    stones_share        by volume, 0..1

    % x density x cm x (1 - stones); no further tenth. The same with carbon in percent
    gives carbon.
    Source: hand_arithmetic; golden: organic_matter.json
    """
    share = need_percent("organic_matter_pct", organic_matter_pct)
    density = need_above_zero("bulk_density_g_cm3", bulk_density_g_cm3)
    depth = need_not_negative("depth_cm", depth_cm)
    return share * density * depth * (1 - need_share("stones_share", stones_share))


def organic_matter_pct(carbon_pct: float, factor: float = 1.724) -> float:
    """Organic matter from organic carbon. [%]

    factor  1.724 (van Bemmelen); 2 is often preferred now
    Source: ssir_45_2011; golden: organic_matter.json
    """
    return need_percent("carbon_pct", carbon_pct) * need_above_zero("factor", factor)


def nitrogen_t_ha(
    organic_matter_t_ha: float, carbon_share: float = 0.58, carbon_to_nitrogen: float = 11.6
) -> float:
    """Nitrogen in organic matter. [t ha-1]

    carbon_share        carbon in organic matter, 0..1
    carbon_to_nitrogen  weight ratio; 11.6 with 0.58 gives the usual twentieth. Conifer
                        litter runs far higher, so give the ground's own where known.
    Source: common_practice; golden: organic_matter.json
    """
    matter = need_not_negative("organic_matter_t_ha", organic_matter_t_ha)
    ratio = need_above_zero("carbon_to_nitrogen", carbon_to_nitrogen)
    return matter * need_some_share("carbon_share", carbon_share) / ratio


def amendment_t_ha(
    from_pct: float,
    to_pct: float,
    bulk_density_g_cm3: float,
    depth_cm: float,
    organic_share: float,
    dry_share: float,
) -> tuple[float, float, float]:
    """Amendment that raises organic matter: (organic, dry, fresh) weight. [t ha-1]

    from_pct, to_pct  organic matter now and wanted [%]
    organic_share     organic matter in the amendment's dry weight, above 0 to 1
    dry_share         dry weight in the amendment as delivered, above 0 to 1

    What rots in the first years is not allowed for.
    Refused: a target below what is there.
    Source: hand_arithmetic; golden: organic_matter.json
    """
    if need_percent("to_pct", to_pct) < need_percent("from_pct", from_pct):
        raise RefusedError("more_than_all", field="from_pct", value=from_pct, limit=to_pct)
    needed = organic_matter_t_ha(to_pct - from_pct, bulk_density_g_cm3, depth_cm)
    dry = needed / need_some_share("organic_share", organic_share)
    return needed, dry, dry / need_some_share("dry_share", dry_share)
