"""A compound's structure as the files other programs read: XYZ and MDL SD (V2000)."""

from shapeshelf.report.model import CompoundReport

PROPERTIES_A_LINE = 8


def xyz_text(report: CompoundReport) -> str:
    """Return the structure in XYZ: a count, one line of comment, symbols and ångström."""
    rows = [
        f"{atom.element:<3}{x:14.6f}{y:14.6f}{z:14.6f}"
        for atom, (x, y, z) in zip(
            report.molecule.atoms, report.structure.coordinates_angstrom, strict=True
        )
    ]
    comment = (
        f"{_one_line(report.name)}; charge {report.molecule.charge};"
        f" multiplicity {report.lewis.multiplicity}; {_one_line(report.structure.method)}"
    )
    return "\n".join([str(len(rows)), comment, *rows, ""])


def sdf_text(report: CompoundReport) -> str:
    """Return the structure as one SD record, V2000.

    The format is that of the CTfile specification; dative bonds are written as single bonds.
    Raises nothing: a molecule of more than 999 atoms has no V2000 record and gives an empty text.
    """
    molecule = report.molecule
    if max(len(molecule.atoms), len(molecule.bonds)) > 999:
        return ""
    lines = [_one_line(report.name)[:80], "  shapeshelf          3D", ""]
    lines.append(
        f"{len(molecule.atoms):3d}{len(molecule.bonds):3d}  0  0  0  0            999 V2000"
    )
    for atom, (x, y, z) in zip(molecule.atoms, report.structure.coordinates_angstrom, strict=True):
        lines.append(
            f"{x:10.4f}{y:10.4f}{z:10.4f} {atom.element:<3} 0  0  0  0  0  0  0  0  0  0  0  0"
        )
    lines += [f"{b.begin + 1:3d}{b.end + 1:3d}{b.order:3d}  0" for b in molecule.bonds]
    lines += _property_lines("CHG", [(i, a.formal_charge) for i, a in enumerate(molecule.atoms)])
    lines += _property_lines("ISO", [(i, a.isotope) for i, a in enumerate(molecule.atoms)])
    lines += _property_lines(
        "RAD",
        [
            (i, single + 1)
            for i, a in enumerate(report.lewis.atoms)
            if (single := a.single_electrons)
        ],
    )
    return "\n".join([*lines, "M  END", *_data_items(report), "$$$$", ""])


def _property_lines(kind: str, values: list[tuple[int, int]]) -> list[str]:
    held = [(index + 1, value) for index, value in values if value]
    chunks = [held[i : i + PROPERTIES_A_LINE] for i in range(0, len(held), PROPERTIES_A_LINE)]
    return [
        f"M  {kind}{len(chunk):3d}" + "".join(f" {index:3d} {value:3d}" for index, value in chunk)
        for chunk in chunks
    ]


def _data_items(report: CompoundReport) -> list[str]:
    items = {
        "ID": report.id,
        "NAME": report.name,
        "CAS": report.entry.cas if report.entry else None,
        "SHAPE": report.shape,
        "POINT_GROUP": report.point_group,
        "STRUCTURE_BASIS": report.structure.basis.value,
    }
    lines: list[str] = []
    for key, value in items.items():
        if value:
            lines += [f">  <{key}>", _one_line(value), ""]
    return lines


def _one_line(text: str) -> str:
    return " ".join(text.split())
