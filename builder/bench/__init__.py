"""The benchmark: every goal of speed and size, measured here, its machine beside it."""
