"""One number from several bases: measured before calculated before supplied before model."""

from collections.abc import Iterable
from dataclasses import replace

from shapeshelf.catalogue.model import Measurement
from shapeshelf.geometry.model import Structure, StructureBasis
from shapeshelf.report.model import Basis, Value

MODEL_NAME = "electron-domain model"


def best_value(
    model: float | None,
    model_uncertainty: float | None,
    measurement: Measurement | None = None,
    calculated: float | None = None,
    calculated_uncertainty: float | None = None,
    method: str | None = None,
    supplied: float | None = None,
    model_name: str = MODEL_NAME,
) -> Value:
    """Return the value with every basis it has; at least one basis must be given."""
    measured = measurement.value if measurement else None
    measured_uncertainty = measurement.uncertainty if measurement else None
    ranked = (
        (
            Basis.MEASURED,
            measured,
            measured_uncertainty,
            measurement.source if measurement else None,
        ),
        (Basis.CALCULATED, calculated, calculated_uncertainty, method),
        (Basis.SUPPLIED, supplied, None, "supplied coordinates"),
        (Basis.MODEL, model, model_uncertainty, model_name),
    )
    basis, value, uncertainty, source = next(row for row in ranked if row[1] is not None)
    assert value is not None
    return Value(
        value=value,
        uncertainty=uncertainty,
        basis=basis,
        model=model,
        model_uncertainty=model_uncertainty,
        calculated=calculated,
        calculated_uncertainty=calculated_uncertainty,
        measured=measured,
        measured_uncertainty=measured_uncertainty,
        source=source,
        measurement=measurement,
        supplied=supplied,
    )


def with_calculated(value: Value, calculated: float, half_width: float, method: str) -> Value:
    """Return ``value`` with a calculated one beside the others; it is the best but a measured."""
    beside = replace(value, calculated=calculated, calculated_uncertainty=half_width)
    if value.basis is Basis.MEASURED:
        return beside
    return replace(
        beside, value=calculated, uncertainty=half_width, basis=Basis.CALCULATED, source=method
    )


def structure_value(
    structure: Structure,
    in_structure: float,
    uncertainty: float | None,
    domain_model: float | None,
    measurement: Measurement | None,
) -> Value:
    """Return an angle or length; what the structure shows is the model's unless supplied.

    ``domain_model`` is what the model says where the structure is not its own.
    """
    if structure.basis is StructureBasis.SUPPLIED:
        return best_value(
            domain_model,
            uncertainty if domain_model is not None else None,
            measurement,
            supplied=in_structure,
        )
    return best_value(in_structure, uncertainty, measurement, model_name=structure.method)


def most_precise(measurements: Iterable[Measurement]) -> Measurement | None:
    """Return the measurement with the smallest stated uncertainty, the first among equals."""
    return min(
        measurements,
        key=lambda item: float("inf") if item.uncertainty is None else item.uncertainty,
        default=None,
    )
