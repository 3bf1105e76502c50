"""From reports to template values, and from those to HTML, JSON and the lookup index."""
