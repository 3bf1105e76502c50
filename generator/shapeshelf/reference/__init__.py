"""Published tables, one file a table: source, DOI or ISBN, units; no logic."""
