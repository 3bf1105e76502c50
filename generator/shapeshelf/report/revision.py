"""The mark by which a page and its drawing sheet say which state of the data they show."""

import hashlib
import json

from shapeshelf.report.json import report_json
from shapeshelf.report.model import CompoundReport

DIGITS = 8


def data_text(report: CompoundReport) -> str:
    """Return the contract's JSON of one compound as its file holds it."""
    return json.dumps(report_json(report), ensure_ascii=False, indent=1)


def revision(report: CompoundReport) -> str:
    """Return a short hash of all that the compound's data say; the same data, the same mark."""
    return hashlib.sha256(data_text(report).encode()).hexdigest()[:DIGITS]
