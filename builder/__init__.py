"""Beltbook: region tables in, field app and pocket booklet out."""

__version__ = "0.1.0"
