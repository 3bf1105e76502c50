"""YAML files to frozen entries, every problem with file and line."""
