"""Permanent addresses, protocol checks, releases."""
