"""Protocols in their formats to one plain form: blocks of text with the links in them."""
