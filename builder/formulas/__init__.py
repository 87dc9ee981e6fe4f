"""Pure arithmetic of the trade: numbers in, numbers out, one file a topic.

No file here reads a file, a clock or a table. Units end the names; shares are
0..1. A value that cannot be true is refused with a sentence (`refusal`), never
clamped and never turned into NaN.
"""
