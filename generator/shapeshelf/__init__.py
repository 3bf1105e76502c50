"""Shapeshelf: a chemistry group's own reference of molecular shape."""

__version__ = "0.1.0"
