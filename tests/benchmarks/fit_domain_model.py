"""Refit every parameter of the electron-domain model, and say how good it is.

    python tests/benchmarks/fit_domain_model.py            fit, cross-validate, print residuals
    python tests/benchmarks/fit_domain_model.py --curve    also error against number of parameters

Rows: tests/data/angles.csv. Cross-validation is by molecule, ten folds. The loss is soft-l1 with
the scale below, since some of the angles are themselves uncertain by degrees. The second table,
tests/data/angles_checked.csv, takes no part in the fit.
"""

import argparse
from collections import defaultdict
from dataclasses import dataclass, fields, replace

import numpy as np
import numpy.typing as npt
from angle_rows import CHECKED_ON, FITTED_ON, AngleRow, read_rows
from scipy.optimize import least_squares

from shapeshelf.domains.parameters import FITTED, DomainTraits, Parameters, problem_of
from shapeshelf.domains.relaxing import relax_from
from shapeshelf.domains.repulsion import curvature, gradient, relax, turn
from shapeshelf.domains.uncertainty import half_widths_degrees

Array = npt.NDArray[np.float64]
SOFT_SCALE_DEGREES = 2.5
FOLDS = 10
STEP = 1e-4
NAMES = tuple(field.name for field in fields(Parameters))
OFF = Parameters(**dict.fromkeys(NAMES, 0.0) | {"ln_contact": -60.0, "radius_angstrom": 0.3})
CURVE = (
    ("lone_pair_light", "lone_pair_heavy"),
    ("electronegativity", "order"),
    ("ln_contact", "radius_angstrom"),
    ("single_electron", "hydrogen_heavy"),
    ("orthogonality",),
    ("order_shared",),
    ("size_angstrom",),
    ("lone_pair_pyramidal",),
)


@dataclass
class FitCentre:
    """One centre with the rows measured at it, and where its domains last were."""

    element: str
    traits: tuple[DomainTraits, ...]
    frames: Array
    rows: list[int]


def main() -> None:
    """Fit, cross-validate and print."""
    options = argparse.ArgumentParser(description=__doc__)
    options.add_argument("--curve", action="store_true")
    arguments = options.parse_args()
    rows = read_rows(FITTED_ON)
    print(
        "ideal angles    ", summary(np.array([r.ideal_degrees - r.measured_degrees for r in rows]))
    )
    if arguments.curve:
        print_curve(rows)
    parameters, fitted, held_back = cross_validated(rows, FITTED, NAMES)
    for name in NAMES:
        print(f"    {name}: float = {getattr(parameters, name):.3f}")
    print("fitted          ", summary(fitted))
    print("cross-validated ", summary(held_back))
    print_classes(rows, held_back)
    print_worst(rows, held_back)
    print_coverage(rows, held_back)
    others = read_rows(CHECKED_ON)
    print(
        "not fitted on   ", summary(residuals(others, centres_of(others, parameters), parameters))
    )


def cross_validated(
    rows: list[AngleRow], start: Parameters, free: tuple[str, ...]
) -> tuple[Parameters, Array, Array]:
    """Return the parameters, the residuals of the fit and those of held-back molecules."""
    parameters = fit(rows, start, free)
    fitted = residuals(rows, centres_of(rows, parameters), parameters)
    held_back = np.zeros(len(rows))
    folds = folds_of(rows)
    for fold in range(FOLDS):
        kept = [row for row, number in zip(rows, folds, strict=True) if number != fold]
        out = [k for k, number in enumerate(folds) if number == fold]
        partial = fit(kept, parameters, free)
        tested = [rows[k] for k in out]
        held_back[out] = residuals(tested, centres_of(tested, partial), partial)
    return parameters, fitted, held_back


def folds_of(rows: list[AngleRow]) -> list[int]:
    """Return the fold of each row; all rows of a molecule share one."""
    names = sorted({row.molecule for row in rows})
    np.random.default_rng(0).shuffle(names)
    number = {name: k % FOLDS for k, name in enumerate(names)}
    return [number[row.molecule] for row in rows]


def fit(rows: list[AngleRow], start: Parameters, free: tuple[str, ...]) -> Parameters:
    """Return ``start`` with the ``free`` parameters fitted."""
    centres = centres_of(rows, start)

    def parameters_at(x: Array) -> Parameters:
        return replace(start, **dict(zip(free, x.tolist(), strict=True)))

    result = least_squares(
        lambda x: residuals(rows, centres, parameters_at(x)),
        np.array([getattr(start, name) for name in free]),
        jac=lambda x: slopes(rows, centres, parameters_at(x), free),
        loss="soft_l1",
        f_scale=SOFT_SCALE_DEGREES,
        x_scale=0.1,
        xtol=1e-4,
        ftol=1e-5,
    )
    return parameters_at(result.x)


def centres_of(rows: list[AngleRow], parameters: Parameters) -> list[FitCentre]:
    """Return the centres that the rows speak of, relaxed from their placements."""
    grouped: dict[tuple[str, tuple[DomainTraits, ...]], list[int]] = defaultdict(list)
    for k, row in enumerate(rows):
        grouped[(row.element, row.traits)].append(k)
    centres = []
    for (element, traits), members in grouped.items():
        start = np.array([rows[members[0]].directions])
        frames, _ = relax_from(problem_of(element, traits, parameters), start)
        centres.append(FitCentre(element, traits, frames, members))
    return centres


def residuals(rows: list[AngleRow], centres: list[FitCentre], parameters: Parameters) -> Array:
    """Return model minus measured, in degrees, one a row."""
    found = np.zeros(len(rows))
    for centre in centres:
        problem = problem_of(centre.element, centre.traits, parameters)
        centre.frames, _ = relax(problem, centre.frames)
        found[centre.rows] = _angles_degrees(rows, centre, centre.frames)
    return found - np.array([row.measured_degrees for row in rows])


def slopes(
    rows: list[AngleRow], centres: list[FitCentre], parameters: Parameters, free: tuple[str, ...]
) -> Array:
    """Return d(angle)/d(parameter), by the implicit function theorem at each relaxed centre."""
    table = np.zeros((len(rows), len(free)))
    for centre in centres:
        problem = problem_of(centre.element, centre.traits, parameters)
        inverse = np.linalg.pinv(curvature(problem, centre.frames)[0], rcond=1e-6, hermitian=True)
        for column, name in enumerate(free):
            forces = [
                gradient(problem_of(centre.element, centre.traits, changed), centre.frames)
                for changed in _either_side(parameters, name)
            ]
            response = -(inverse @ (forces[1] - forces[0]).ravel()) / (2 * STEP)
            moves = response.reshape(forces[0].shape) * STEP
            after, before = (
                _angles_degrees(rows, centre, turn(centre.frames, sign * moves)) for sign in (1, -1)
            )
            table[centre.rows, column] = (after - before) / (2 * STEP)
    return table


def _either_side(parameters: Parameters, name: str) -> list[Parameters]:
    value = getattr(parameters, name)
    return [replace(parameters, **{name: value + sign * STEP}) for sign in (-1, 1)]


def _angles_degrees(rows: list[AngleRow], centre: FitCentre, frames: Array) -> Array:
    pairs = [rows[k].pair for k in centre.rows]
    directions = frames[0, 0]
    cosines = [float(directions[i] @ directions[j]) for i, j in pairs]
    return np.degrees(np.arccos(np.clip(cosines, -1, 1)))


def summary(found: Array) -> str:
    """Return the measures of error that the project promises."""
    size = np.abs(found)
    return (
        f"{len(size)} angles, mean {size.mean():.2f}, 90th percentile "
        f"{np.quantile(size, 0.9):.2f}, largest {size.max():.1f}, bias {found.mean():+.2f}"
    )


def print_curve(rows: list[AngleRow]) -> None:
    """Print the cross-validated error as parameters are let in one group after another."""
    free: tuple[str, ...] = ()
    start = OFF
    for names in CURVE:
        free += names
        start = replace(start, **{name: getattr(FITTED, name) for name in names})
        start, _, held_back = cross_validated(rows, start, free)
        print(f"{len(free):3d} parameters  ", summary(held_back), " + " + ", ".join(names))


def print_classes(rows: list[AngleRow], held_back: Array) -> None:
    """Print the error by number of bonds and of empty domains."""
    classes: dict[str, list[float]] = defaultdict(list)
    for row, value in zip(rows, held_back, strict=True):
        classes[f"AX{row.bonded}E{row.empty}"].append(float(value))
    for name, values in sorted(classes.items()):
        print(f"    {name:8}", summary(np.array(values)))


def print_worst(rows: list[AngleRow], held_back: Array) -> None:
    """Print the ten largest residuals."""
    for k in np.argsort(-np.abs(held_back))[:10]:
        print(f"    {rows[k].molecule:10}{rows[k].of:12}{held_back[k]:+.1f}")


def print_coverage(rows: list[AngleRow], held_back: Array) -> None:
    """Print the table of half-widths and how many residuals half-widths of other folds cover."""
    keys = [(row.element, row.bonded, row.empty) for row in rows]
    sizes = np.abs(held_back)
    folds = np.array(folds_of(rows))
    covered = np.zeros(len(rows), dtype=bool)
    for fold in range(FOLDS):
        kept = [(keys[k], float(sizes[k])) for k in np.flatnonzero(folds != fold)]
        table = half_widths_degrees(kept)
        for k in np.flatnonzero(folds == fold):
            covered[k] = sizes[k] <= table.of(*keys[k])
    print(f"half-widths cover {100 * covered.mean():.0f} % of held-back residuals")
    print(half_widths_degrees(list(zip(keys, sizes.tolist(), strict=True))))


if __name__ == "__main__":
    main()
