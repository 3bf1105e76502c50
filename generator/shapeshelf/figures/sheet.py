"""The drawing sheet: a molecule drawn as a workshop draws a part."""

from shapeshelf.figures.model import Svg
from shapeshelf.report.model import CompoundReport


def sheet(report: CompoundReport) -> Svg | None:
    """Return the sheet, ``None`` where a molecule has too many atoms for one."""
    return None
