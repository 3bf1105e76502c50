"""Entry to molecule: the one room that speaks RDKit."""
