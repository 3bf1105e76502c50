"""The working of a centre in plain words, one numbered rule a step."""

from collections import Counter

from shapeshelf.domains.graph import valence_electrons
from shapeshelf.domains.metal_rules import MetalShape
from shapeshelf.domains.metals import MetalCentre
from shapeshelf.domains.model import Domain, DomainKind, LewisAtom, LewisCount, Placement, TraceStep
from shapeshelf.domains.placing import arrangement_name
from shapeshelf.domains.trace_angles import angle_steps
from shapeshelf.reference.departures import KnownDeparture
from shapeshelf.structure.molecule import Molecule

NUMBERS = ("no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine")

WHY_IN_PI = {
    "D1": "another drawing of equal standing has a bond there",
    "D2": "it completes the 4n + 2 electrons of a ring",
    "D3": "a neighbouring carbon is doubly bonded to a more electronegative atom",
    "D4": "a neighbouring nitrogen is doubly bonded to oxygen or nitrogen",
    "D5": "a neighbour lacks a pair",
    "D6": "a neighbouring oxygen has a single electron",
}
"""Reasons by rule of domains/delocalisation.py."""


def trace_main_group(
    molecule: Molecule,
    lewis: LewisCount,
    atom: int,
    domains: tuple[Domain, ...],
    placements: tuple[Placement, ...],
    known: KnownDeparture | None,
) -> tuple[TraceStep, ...]:
    """Return the steps for a main-group centre."""
    count = lewis.atoms[atom]
    steps = [_counted(molecule, atom, count), *_delocalised(count)]
    steps.append(_domains(domains))
    if known:
        steps.append(_by_rule(domains))
        steps.append(TraceStep("departure", f"{known.sentence} ({known.source})."))
        return tuple(steps)
    steps += _placed(molecule, domains, placements)
    steps += angle_steps(molecule, atom, domains, placements[0])
    return tuple(steps)


def trace_unplaceable(reason: str) -> tuple[TraceStep, ...]:
    """Return the one step of a centre with more domains than can be placed."""
    return (TraceStep("P1", f"{reason}."),)


def trace_metal(
    metal: MetalCentre,
    found: MetalShape | None,
    placements: tuple[Placement, ...],
    molecule: Molecule,
) -> tuple[TraceStep, ...]:
    """Return the steps for a metal centre."""
    steps = [_oxidation(metal)]
    if found is None:
        why = metal.obstacle or "no rule covers this number of neighbours and d electrons"
        steps.append(TraceStep("M", f"No shape by rule: {why}. {_from_coordinates(molecule)}"))
        return tuple(steps)
    steps.append(TraceStep(found.rule, f"{found.symbol}: {found.reason} ({found.source})."))
    if found.departs:
        steps.append(TraceStep("departure", f"{found.departs} ({found.source})."))
    if len(placements) > 1:
        steps.append(
            TraceStep(
                "S",
                f"{len(placements)} arrangements of the ligands differ; the first is shown, "
                "the drawing itself does not say which isomer it is.",
            )
        )
    return tuple(steps)


def _from_coordinates(molecule: Molecule) -> str:
    if molecule.coordinates_angstrom:
        return "The supplied coordinates give it."
    return "Coordinates in a file would give it."


def _counted(molecule: Molecule, atom: int, count: LewisAtom) -> TraceStep:
    element, charge = molecule.atoms[atom].element, count.formal_charge
    valence = valence_electrons(element)
    charged = f", {-charge:+d} for its charge" if charge else ""
    left = 2 * count.lone_pairs + count.single_electrons
    given = 2 * sum(bond.dative and bond.begin == atom for bond in molecule.bonds)
    given_away = f", {given} are given to a neighbour" if given else ""
    return TraceStep(
        "C1",
        f"{element} brings {plural(valence, 'valence electron')}{charged}; "
        f"{max(valence - charge - left - given, 0)} go into its bonds{given_away}, {left} stay: "
        f"{plural(count.lone_pairs, 'lone pair')}"
        + (f", {plural(count.single_electrons, 'single electron')}" * bool(count.single_electrons))
        + ".",
    )


def _delocalised(count: LewisAtom) -> list[TraceStep]:
    steps = []
    if count.delocalised_pairs:
        number = _capital(plural(count.delocalised_pairs, "lone pair"))
        verb = "lies" if count.delocalised_pairs == 1 else "lie"
        why = WHY_IN_PI[count.delocalised_by]
        text = f"{number} {verb} in the pi system, no domain in the plane: {why}."
        steps.append(TraceStep(count.delocalised_by, text))
    if count.delocalised_singles:
        text = "The single electron is spread over the pi system, no domain of its own."
        steps.append(TraceStep("D1", text))
    return steps


def _domains(domains: tuple[Domain, ...]) -> TraceStep:
    kinds = [domain.kind for domain in domains]
    parts = [plural(kinds.count(kind), kind.value) for kind in DomainKind if kinds.count(kind)]
    return TraceStep("C", f"{_capital(plural(len(domains), 'domain'))}: {', '.join(parts)}.")


def _by_rule(domains: tuple[Domain, ...]) -> TraceStep:
    """Say what the rule alone would give where the centre is known to leave it."""
    count = len(domains)
    return TraceStep("P1", f"By the rule: {plural(count, 'domain')}, {arrangement_name(count)}.")


def _placed(
    molecule: Molecule, domains: tuple[Domain, ...], placements: tuple[Placement, ...]
) -> list[TraceStep]:
    best = placements[0]
    count = len(best.directions)
    bonds = sum(domain.kind is DomainKind.BOND for domain in domains)
    text = f"{_capital(plural(count, 'domain'))} lie furthest apart as {arrangement_name(count)}"
    steps = [TraceStep("P1", f"{text}; the {plural(bonds, 'bond')} are {best.shape}.")]
    if len(placements) > 1:
        held = _held(molecule, domains, best)
        steps.append(TraceStep("P2", f"Least repulsion{held} of {plural(len(placements), 'way')}."))
    for other in placements[1:3]:
        held, cost = _held(molecule, domains, other), other.energy - best.energy
        steps.append(
            TraceStep(
                "P2", f"{_capital(other.shape)}{held}: {cost:.3f} more, in the model's units."
            )
        )
    return steps


def _held(molecule: Molecule, domains: tuple[Domain, ...], placement: Placement) -> str:
    """Say who stands on the axis or apex, or where the lone pairs are."""
    bare = [
        f"{domain.kind.value} {site}"
        for domain, site in zip(domains, placement.sites, strict=False)
        if domain.kind is not DomainKind.BOND and site
    ]
    top = [
        f"{molecule.atoms[domain.neighbour].element} {site}"
        for domain, site in zip(domains, placement.sites, strict=False)
        if domain.neighbour is not None and site in ("ax", "ap")
    ]
    named = bare or sorted(top)
    counted = Counter(named)
    texts = [text if n == 1 else f"{NUMBERS[n]} times {text}" for text, n in counted.items()]
    return f" with {', '.join(texts)}" if texts else ""


def _oxidation(metal: MetalCentre) -> TraceStep:
    electrons = "" if metal.d_electrons is None else f", d{metal.d_electrons}"
    return TraceStep(
        "M1",
        f"{metal.element} in oxidation state {metal.oxidation_state:+d}{electrons}, "
        f"{plural(metal.coordination, 'neighbour')}.",
    )


def plural(number: int, noun: str) -> str:
    """Return the number in words with its noun."""
    word = NUMBERS[number] if 0 <= number < len(NUMBERS) else str(number)
    return f"{word} {noun}" + ("" if number == 1 else "s")


def _capital(text: str) -> str:
    return text[:1].upper() + text[1:]
