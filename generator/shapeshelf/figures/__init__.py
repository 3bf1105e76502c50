"""Projection, palette, drawing: the one room that speaks matplotlib."""
