"""The report as a few lines for a terminal."""

from shapeshelf.report.model import AngleRow, CentreReport, CompoundReport, Value


def report_text(report: CompoundReport) -> str:
    """Return shape, point group, polarity, and the angles of every distinct centre."""
    lines = [f"{report.name}  {report.molecule.formula}  {report.molecule.smiles}"]
    if report.shape:
        lines.append(f"shape        {report.shape}")
    lines.append(f"point group  {report.point_group} ({report.point_group_basis.value})")
    lines.append(f"polarity     {_polarity(report)}")
    for centre in report.centres:
        if centre.centre.atom == min(centre.equivalent):
            lines += _centre(centre)
    lines += [f"caution      {caution.text}" for caution in report.cautions]
    return "\n".join(lines)


def _polarity(report: CompoundReport) -> str:
    if report.dipole_debye is None:
        return report.dipole_model.reason
    word = "polar" if report.dipole_model.polar else "not polar"
    return f"{word}, {_number(report.dipole_debye, 2)} D: {report.dipole_model.reason}"


def _centre(report: CentreReport) -> list[str]:
    centre = report.centre
    count = f" ({len(report.equivalent)} alike)" if len(report.equivalent) > 1 else ""
    symbol = f" {report.polyhedral_symbol}" if report.polyhedral_symbol else ""
    lines = [f"{centre.label}{count}: {centre.notation}, {report.shape or 'no rule'}{symbol}"]
    lines += [_angle(row) for row in report.angles]
    if centre.departure:
        lines.append(f"  departs: {centre.departure.sentence}")
    return lines


def _angle(row: AngleRow) -> str:
    return f"  {row.of:<20} {_number(row.degrees, 1)}°, {len(row.members)} of them"


def _number(value: Value, digits: int) -> str:
    spread = "" if value.uncertainty is None else f" ± {value.uncertainty:.{digits}f}"
    return f"{value.value:.{digits}f}{spread} ({value.basis.value})"
