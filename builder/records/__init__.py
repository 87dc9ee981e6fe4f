"""The crews' records: site checks, units and photos, as phones write them.

clean takes nothing on trust, merge says which version stands, exchange reads and writes the file
phones hand over, the other modules write what other programs and people read. store keeps them.
Records are plain dictionaries with the fields of docs/schemas/site_check.json; nothing here knows
the web.
"""
