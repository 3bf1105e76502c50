"""The QR code of a page's address, for the printed sheet."""

import io

import segno

QUIET_MODULES = 4
"""Margin that ISO/IEC 18004 asks for (recalled from memory)."""


def qr_svg(address: str) -> bytes:
    """Return the code of an absolute address as SVG, black on white."""
    code = segno.make(address, error="m", micro=False)
    out = io.BytesIO()
    code.save(out, kind="svg", xmldecl=False, light="#ffffff", border=QUIET_MODULES, omitsize=True)
    return out.getvalue()
