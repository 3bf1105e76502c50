"""Quantum-chemistry engines, records, the runner."""
