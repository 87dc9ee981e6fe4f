"""Writes the field app, the Book pages and the single-file page from packs and app sources.

`build_site` is the way in. Files are made in memory, written beside the old site and swapped in as
a whole; a build that fails leaves the old site as it was.
"""

from builder.site.build import SiteReport, build_site
from builder.site.region import SiteRegion

__all__ = ["SiteRegion", "SiteReport", "build_site"]
