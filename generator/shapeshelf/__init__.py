"""Shapeshelf: a chemistry group's own reference of molecular shape."""

import os

__version__ = "0.1.0"

# Matrices here are small: threads of the linear-algebra library cost more than they bring, and
# on a busy machine many times more. Set before numpy is loaded; a user's own setting stands.
for _variable in ("OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS"):
    os.environ.setdefault(_variable, "1")
