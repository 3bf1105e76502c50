"""Fit the coefficients of the dipole model to open values and cross-validate them.

    python tests/benchmarks/fit_dipole_model.py            fit, cross-validate, print
    python tests/benchmarks/fit_dipole_model.py --write    and write charge_parameters.py

Values (tests/data/): dipoles.csv and dipoles_fit.csv, measured moments; dipoles_calculated.jsonl,
moment vectors computed at the structures given there (calculate_dipoles.py), which tell
directions and fill classes of compound that few measurements cover.

A molecule in the fold left out is left out of both, measured and computed. Ridge regression
towards zero (towards the values of PRIORS for two coefficients); the size of a measured vector is
not linear in the coefficients, so Gauss-Newton steps; Huber's weights tame single bad values.
"""

import argparse
import csv
import json
from collections import Counter, defaultdict
from dataclasses import dataclass
from pathlib import Path

import numpy as np

import shapeshelf.properties.charge_parameters as parameters
from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.properties.charges import charge_graph, transfers
from shapeshelf.properties.dipole_classes import CLASSES, dipole_class
from shapeshelf.properties.lone_pair_moments import lone_moments
from shapeshelf.properties.polarity import DEBYE_PER_ELECTRON_ANGSTROM, symmetry_projection
from shapeshelf.structure.reading import read_smiles

DATA = Path(__file__).parents[1] / "data"
FOLDS, SEED, STEPS = 10, 1, 15
HUBER = 2.0
LEAST_COEFFICIENT = 0.0005
LEAST_ROWS = 20

PRIORS = {"difference": 0.15, "charge": 0.5}
"""A quarter of Pauling's ionic character per unit, and half of a formal charge evened out."""
SPREADS = {
    # first word of the term: how far its coefficient is expected from the prior
    "difference": 0.1,
    "atom": 0.08,
    "bond": 0.06,
    "multiple": 0.06,
    "induction": 0.015,
    "charge": 0.15,
    "n": 0.02,
    "h": 0.03,
    "conjugated": 0.03,
    "lone": 0.4,
}


@dataclass
class Row:
    """One molecule: its measured size or its computed vector, and its terms as vectors."""

    name: str
    key: str
    source: str
    rotors: int
    given: bool
    elements: tuple
    kind: object
    size: float | None
    vector: np.ndarray | None
    terms: dict
    fixed: np.ndarray
    allowed: np.ndarray


def main():
    arguments = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    arguments.add_argument("--write", action="store_true")
    write = arguments.parse_args().write
    rows = measured_rows() + computed_rows()
    fit = Fit(rows)
    left_out = fit.cross_validated()
    print_summary(fit, left_out)
    print_steadiness(fit, rows)
    uncertainty = class_uncertainties(fit, left_out)
    coefficients = fit.named(fit.coefficients(range(len(rows))))
    print(f"{len(coefficients)} coefficients written of {len(fit.names)} terms")
    if write:
        write_parameters(coefficients, uncertainty)


def measured_rows():
    rows = []
    for file, given in (("dipoles.csv", True), ("dipoles_fit.csv", False)):
        with (DATA / file).open(encoding="utf-8") as lines:
            for record in csv.DictReader(line for line in lines if not line.startswith("#")):
                molecule = read_smiles(record["smiles"])
                lewis, centres = analyse(molecule)
                coordinates = assemble(molecule, lewis, centres).coordinates_angstrom
                source = record.get("source", "cccbdb")
                label = (record["name"], source, int(record["rotors"]), given)
                size = float(record["dipole_D"])
                rows.append(row_of(molecule, lewis, coordinates, label, size, None))
    return rows


def computed_rows():
    rows = []
    for line in (DATA / "dipoles_calculated.jsonl").read_text(encoding="utf-8").splitlines():
        record = json.loads(line)
        if "smiles" not in record:
            continue
        molecule = read_smiles(record["smiles"])
        lewis, _ = analyse(molecule)
        label = (record["smiles"], "computed", 0, False)
        vector = np.array(record["dipole"])
        rows.append(row_of(molecule, lewis, record["xyz"], label, None, vector))
    return rows


def row_of(molecule, lewis, coordinates, label, size, vector):
    symmetry = find_symmetry([atom.element for atom in molecule.atoms], coordinates)
    xyz = np.array(symmetry.coordinates_angstrom)
    allowed = symmetry_projection(symmetry)
    graph = charge_graph(molecule, lewis)
    terms = defaultdict(lambda: np.zeros(3))
    for one in transfers(molecule, graph):
        arm = xyz[one.acceptor] - xyz[one.donor]
        terms[one.term] += DEBYE_PER_ELECTRON_ANGSTROM * one.factor * allowed @ arm
    for lone in lone_moments(graph, xyz):
        terms[lone.term] += allowed @ lone.direction
    fixed = -DEBYE_PER_ELECTRON_ANGSTROM * allowed @ (graph.formal_charges @ xyz)
    key = molecule.inchikey or molecule.smiles
    return Row(
        *(label[0], key, *label[1:]), graph.elements, graph, size, vector, terms, fixed, allowed
    )


class Fit:
    """The rows as matrices."""

    def __init__(self, rows):
        self.rows = rows
        used = Counter(
            term for row in rows for term, arm in row.terms.items() if np.linalg.norm(arm) > 1e-3
        )
        self.names = sorted(used)
        place = {name: k for k, name in enumerate(self.names)}
        self.prior = np.array([PRIORS.get(name, 0.0) for name in self.names])
        self.spread = np.array([SPREADS[name.split()[0]] for name in self.names])
        self.arms = np.zeros((len(rows), 3, len(self.names)))
        for k, row in enumerate(rows):
            for name, arm in row.terms.items():
                if name in place:
                    self.arms[k, :, place[name]] = arm
        self.fixed = np.array([row.fixed for row in rows])
        self.polar = np.array([np.abs(row.allowed).max() > 1e-6 for row in rows])

    def coefficients(self, chosen):
        """Ridge regression by Gauss-Newton on the rows ``chosen``."""
        sizes = [k for k in chosen if self.polar[k] and self.rows[k].size is not None]
        vectors = [k for k in chosen if self.polar[k] and self.rows[k].vector is not None]
        found = self.prior.copy()
        for step in range(STEPS):
            normal = np.diag(1 / self.spread**2)
            right = -(found - self.prior) / self.spread**2
            parts = [self.vector_part(vectors, found)]
            if step:
                parts.append(self.size_part(sizes, found))
            for slopes, misses, weights in parts:
                normal += slopes.T @ (weights[:, None] * slopes)
                right += slopes.T @ (weights * misses)
            change = np.linalg.solve(normal, right)
            found = found + (0.7 if 0 < step < 5 else 1.0) * change
            if step > 5 and np.abs(change / self.spread).max() < 0.01:
                break
        return found

    def size_part(self, chosen, found):
        moments = self.arms[chosen] @ found + self.fixed[chosen]
        lengths = np.linalg.norm(moments, axis=1)
        towards = moments / np.maximum(lengths, 1e-9)[:, None]
        slopes = np.einsum("nik,ni->nk", self.arms[chosen], towards)
        wanted = np.array([self.rows[k].size for k in chosen])
        noise = np.array([0.5 if self.rows[k].rotors else 0.2 for k in chosen]) + 0.08 * wanted
        misses = wanted - lengths
        return slopes, misses, 1 / noise**2 / np.maximum(1, np.abs(misses) / (HUBER * noise))

    def vector_part(self, chosen, found):
        wanted = np.array([self.rows[k].vector for k in chosen]).reshape(-1, 3)
        noise = 0.2 + 0.1 * np.linalg.norm(wanted, axis=1)
        misses = wanted - self.arms[chosen] @ found - self.fixed[chosen]
        excess = np.linalg.norm(misses, axis=1) / (HUBER * noise)
        weights = np.repeat(1 / noise**2 / np.maximum(1, excess), 3)
        return self.arms[chosen].reshape(-1, len(self.names)), misses.reshape(-1), weights

    def sizes(self, chosen, found):
        moments = self.arms[chosen] @ found + self.fixed[chosen]
        return np.where(self.polar[chosen], np.linalg.norm(moments, axis=1), 0.0)

    def cross_validated(self, seed=SEED):
        """For every row the size predicted without its molecule, and its class then."""
        keys = sorted({row.key for row in self.rows})
        turn = np.random.default_rng(seed).permutation(len(keys)) % FOLDS
        fold = dict(zip(keys, turn, strict=True))
        of_row = np.array([fold[row.key] for row in self.rows])
        sizes, known = np.zeros(len(self.rows)), [""] * len(self.rows)
        for one in range(FOLDS):
            rest, out = np.flatnonzero(of_row != one), np.flatnonzero(of_row == one)
            sizes[out] = self.sizes(out, self.coefficients(rest))
            terms = {name for k in rest for name in self.rows[k].terms}
            for k in out:
                known[k] = dipole_class(self.rows[k].kind, terms)
        return sizes, known

    def named(self, found):
        return {
            name: round(float(value), 4)
            for name, value in zip(self.names, found, strict=True)
            if abs(value) >= LEAST_COEFFICIENT or name.startswith("bond ")
        }


def print_summary(fit, left_out):
    sizes, _ = left_out
    errors = {k: sizes[k] - row.size for k, row in enumerate(fit.rows) if row.size is not None}
    rigid = [k for k in errors if fit.rows[k].rotors == 0]

    def line(title, chosen):
        chosen = list(chosen)
        miss = np.abs([errors[k] for k in chosen])
        mean, median = miss.mean(), np.median(miss)
        print(f"{title:52s} n {len(chosen):4d}  MAE {mean:.3f}  median {median:.3f}")

    given = [k for k in rigid if fit.rows[k].given]
    line("dipoles.csv, no rotor", given)
    line("  of these, not zero by symmetry", (k for k in given if fit.polar[k]))
    line("dipoles.csv, all", (k for k in errors if fit.rows[k].given))
    line("dipoles_fit.csv, no rotor", (k for k in rigid if not fit.rows[k].given))
    line(
        "both, no rotor, no carbon, not zero by symmetry",
        (k for k in rigid if "C" not in fit.rows[k].elements and fit.polar[k]),
    )
    worst = sorted(rigid, key=lambda k: -abs(errors[k]))[:25]
    for k in worst:
        row = fit.rows[k]
        print(
            f"   {row.name[:30]:30s} measured {row.size:5.2f} left out {sizes[k]:5.2f} "
            f"{left_out[1][k]}"
        )


def print_steadiness(fit, rows):
    """The figure of the bar again: other divisions into folds, and measured values alone."""
    several = [bar(fit, seed) for seed in range(SEED, SEED + 5)]
    print(f"dipoles.csv, no rotor, five divisions into folds: {np.round(several, 3)}")
    alone = Fit([row for row in rows if row.size is not None])
    print(f"dipoles.csv, no rotor, fitted to measured values alone: {bar(alone, SEED):.3f}")


def bar(fit, seed):
    """Mean absolute cross-validated error over the rows of dipoles.csv without a rotor."""
    sizes, _ = fit.cross_validated(seed)
    chosen = [k for k, row in enumerate(fit.rows) if row.given and row.rotors == 0]
    return np.mean([abs(sizes[k] - fit.rows[k].size) for k in chosen])


def class_uncertainties(fit, left_out):
    """Return the 68 % quantile of cross-validated residuals of each class.

    Measured rows, and computed ones where the class has few measurements. A class that the folds
    leave fewer than LEAST_ROWS rows of (alkali halides: each bond stands in one molecule) counts
    its rows with unknown bonds too.
    """
    sizes, kinds = left_out
    whole = [dipole_class(row.kind, set(fit.names)) for row in fit.rows]
    result = {}
    for kind in CLASSES:
        chosen = [k for k, one in enumerate(kinds) if one == kind and fit.polar[k]]
        if len(chosen) < LEAST_ROWS:
            chosen = [k for k, one in enumerate(whole) if one == kind and fit.polar[k]]
        measured = [k for k in chosen if fit.rows[k].size is not None]
        chosen = chosen if len(measured) < LEAST_ROWS or kind == "unfitted" else measured
        misses = [abs(sizes[k] - true_size(fit.rows[k])) for k in chosen]
        result[kind] = round(float(np.quantile(misses, 0.68)), 2)
        print(f"   {kind:12s} n {len(misses):4d}  68 % within {result[kind]:.2f} D")
    return result


def true_size(row):
    return row.size if row.size is not None else float(np.linalg.norm(row.vector))


HEAD = '''"""Fitted coefficients of the dipole model.

Written by tests/benchmarks/fit_dipole_model.py. Names as in charges.py and lone_pair_moments.py;
transfers in elementary charges, lone-pair moments in debye. Fitted to measured moments
(tests/data/dipoles.csv and dipoles_fit.csv: NIST CCCBDB and others as the package ``chemicals``
carries them) and to moments computed at PBE0/def2-SVPD (tests/data/dipoles_calculated.jsonl).
"""

# fmt: off
COEFFICIENTS: dict[str, float] = {
'''
TAIL = '''}
# fmt: on
"""68 % quantile of cross-validated residuals, by class (dipole_classes.py)."""
'''


def write_parameters(coefficients, uncertainty):
    lines = []
    line = "   "
    for name, value in coefficients.items():
        item = f' "{name}": {value:g},'
        if len(line) + len(item) > 100:
            lines.append(line)
            line = "   "
        line += item
    lines += [line, "}", "UNCERTAINTY_DEBYE: dict[str, float] = {"]
    lines += [f'    "{kind}": {value:g},' for kind, value in uncertainty.items()]
    Path(parameters.__file__).write_text(HEAD + "\n".join(lines) + "\n" + TAIL, encoding="utf-8")


if __name__ == "__main__":
    main()
