"""Tables as finished strings and drawings, for the Book pages and the booklet alike."""

from builder.views.look import Look, look
from builder.views.zones import ZoneView, zone_view, zone_views

__all__ = ["Look", "ZoneView", "look", "zone_view", "zone_views"]
