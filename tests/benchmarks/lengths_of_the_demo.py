"""How far the model's bond lengths are from the measured ones of the demo catalogue.

Run by hand: ``python tests/benchmarks/lengths_of_the_demo.py``. Prints, for each way in which a
structure comes about, the mean absolute error, the 68 % quantile (the half-width that
``report/lengths.py`` states) and the worst bonds.
"""

from collections import defaultdict
from pathlib import Path

import numpy as np

from shapeshelf.report.checking import report_on_catalogue

WORST = 12


def main() -> None:
    """Print one block a method."""
    _, reports = report_on_catalogue(Path("compounds"))
    errors = defaultdict(list)
    for report in reports:
        for row in report.lengths:
            value = row.angstrom
            if value.measured is not None and value.model is not None:
                error = abs(value.model - value.measured)
                errors[report.structure.method].append((error, report.id, row.of))
    for method, rows in errors.items():
        sizes = np.array([error for error, *_ in rows])
        print(f"{method}: {len(rows)} bonds, mean {sizes.mean():.3f} Å, ", end="")
        print(f"68 % {np.quantile(sizes, 0.68):.3f} Å, 90 % {np.quantile(sizes, 0.9):.3f} Å")
        for error, name, label in sorted(rows, reverse=True)[:WORST]:
            print(f"    {error:.3f}  {name}  {label}")


if __name__ == "__main__":
    main()
