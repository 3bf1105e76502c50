"""Vectors, polyhedra, three-dimensional assembly, point group."""
