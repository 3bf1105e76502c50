"""A compound's structure as the files other programs read: XYZ and MDL SD (V2000)."""

from shapeshelf.report.model import CompoundReport
from shapeshelf.structure.writing import write_sdf


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
    """Return the structure as one SD record with the entry's identifiers."""
    entry = report.entry
    items = {
        "ID": report.id,
        "NAME": report.name,
        "CAS": entry.cas if entry else None,
        "CODE": entry.code if entry else None,
        "INCHIKEY": report.molecule.inchikey,
        "SHAPE": report.shape,
        "POINT_GROUP": report.point_group,
        "STRUCTURE_BASIS": report.structure.basis.value,
    }
    return write_sdf(
        report.molecule,
        report.structure.coordinates_angstrom,
        report.name,
        {name: value for name, value in items.items() if value},
    )


def _one_line(text: str) -> str:
    return " ".join(text.split())
