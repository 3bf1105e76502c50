"""A calculation that ends without a usable result."""

from shapeshelf.calculation.model import Outcome
from shapeshelf.errors import CalculationError


class UnusableError(CalculationError):
    """Ends one calculation; ``outcome`` and the message go into its record."""

    def __init__(self, outcome: Outcome, sentence: str) -> None:
        self.outcome = outcome
        self.sentence = sentence
        super().__init__(outcome.value, sentence)
