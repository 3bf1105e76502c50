"""Refit the site terms of bond lengths, and say how good they are.

    python tests/benchmarks/fit_bond_lengths.py

Rows: length_rows.py. The terms are linear in their numbers; the loss is soft-l1 with the scale
below, since some lengths belong to molecules that no such rule describes (FOOF, FSSF).
Cross-validation is by molecule, ten folds. Prints the numbers, the errors with and without site
terms by family of bond, the 68 % half-widths of held-back bonds, and the worst.
"""

from collections import Counter

import numpy as np
import numpy.typing as npt
from length_rows import LengthRow, read_length_rows
from scipy.optimize import least_squares

Array = npt.NDArray[np.float64]
SOFT_SCALE_ANGSTROM = 0.03
FOLDS = 10
WORST = 15


def main() -> None:
    """Fit, cross-validate and print."""
    rows = read_length_rows()
    names = sorted({name for row in rows for name in row.terms})
    table = np.array([[row.terms.get(name, 0.0) for name in names] for row in rows])
    missing = np.array([row.measured_angstrom - row.kind_angstrom for row in rows])
    values, used = fitted(table, missing), Counter(name for row in rows for name in row.terms)
    for name, value in zip(names, values, strict=True):
        print(f'    "{name}": {value:.3f},    {used[name]} rows')
    held_back = cross_validated(table, missing, folds_of(rows))
    print("kind alone      ", summary(-missing))
    print("fitted          ", summary(table @ values - missing))
    print("cross-validated ", summary(held_back))
    print_families(rows, -missing, held_back)
    print_worst(rows, -missing, held_back)


def fitted(table: Array, missing: Array) -> Array:
    """Return the numbers (m,) in ångström for weights (n, m) and lengths left over (n,)."""
    start = np.zeros(table.shape[1])
    return np.asarray(
        least_squares(
            lambda x: table @ x - missing, start, loss="soft_l1", f_scale=SOFT_SCALE_ANGSTROM
        ).x
    )


def folds_of(rows: list[LengthRow]) -> npt.NDArray[np.int64]:
    """Return the fold of each row; all rows of a molecule share one."""
    names = sorted({row.molecule for row in rows})
    np.random.default_rng(0).shuffle(names)
    number = {name: k % FOLDS for k, name in enumerate(names)}
    return np.array([number[row.molecule] for row in rows])


def cross_validated(table: Array, missing: Array, folds: npt.NDArray[np.int64]) -> Array:
    """Return model minus measured, in ångström, of bonds held back from the fit."""
    errors = np.zeros(len(missing))
    for fold in range(FOLDS):
        out = folds == fold
        errors[out] = table[out] @ fitted(table[~out], missing[~out]) - missing[out]
    return errors


def summary(errors: Array) -> str:
    """Return the measures of error."""
    size = np.abs(errors)
    return (
        f"{len(size):3d} bonds, mean {size.mean():.3f}, 68 % {np.quantile(size, 0.68):.3f}, "
        f"90 % {np.quantile(size, 0.9):.3f}, largest {size.max():.2f}, bias {errors.mean():+.3f}"
    )


def print_families(rows: list[LengthRow], before: Array, held_back: Array) -> None:
    """Print the errors of each family of bonds, without site terms and held back."""
    families = np.array([row.family for row in rows])
    for family in sorted(set(families)):
        print(f"    {family:12} alone     ", summary(before[families == family]))
        print(f"    {family:12} held back ", summary(held_back[families == family]))


def print_worst(rows: list[LengthRow], before: Array, held_back: Array) -> None:
    """Print the largest errors of held-back bonds beside those without site terms."""
    for k in np.argsort(-np.abs(held_back))[:WORST]:
        row = rows[k]
        print(f"    {row.molecule:18}{row.bond:10}{before[k]:+.3f} {held_back[k]:+.3f}")


if __name__ == "__main__":
    main()
