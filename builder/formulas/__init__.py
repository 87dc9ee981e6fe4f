"""Pure arithmetic: numbers in, numbers out, each with its source."""
