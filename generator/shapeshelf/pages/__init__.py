"""Report to HTML, JSON, CSV and the lookup index."""
