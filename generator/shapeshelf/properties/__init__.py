"""Hybridisation, polarity, expected spectra."""
