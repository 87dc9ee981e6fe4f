"""The desk: a Flask application on this computer for the person who owns the tables.

It also serves the built field app and booklet. It calls steps, records and tables.edit; it holds no
arithmetic and no knowledge of how tables are stored.
"""
