"""The sentence as a few functions: rows → tables → problems? → pack → pages.

checking (rows → tables → problems), building (→ pack → pages), calling and proving (plots), and
documents. Each only calls; values are made in the parts. Nothing here prints. Import from the
module that is meant: loading the booklet's renderer takes longer than checking a region.
"""
