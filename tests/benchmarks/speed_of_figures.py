"""CPU time of the four figures of a small molecule, cold and warm, by hand:

    OMP_NUM_THREADS=1 python tests/benchmarks/speed_of_figures.py [SMILES]

Cold is the first time in a process, once the modules are there; the aim is 120 ms for five atoms.
"""

import sys
import time

from shapeshelf.figures.bench import bench_view
from shapeshelf.figures.lewis import lewis_structure
from shapeshelf.figures.sheet import sheet
from shapeshelf.figures.strip import strip
from shapeshelf.report.building import report_on_structure

ROUNDS = 6


def main() -> None:
    """Print milliseconds for each figure, one line a round."""
    report = report_on_structure(sys.argv[1] if len(sys.argv) > 1 else "FS(F)(F)F")
    for number in range(ROUNDS):
        spent = []
        for draw in (bench_view, lewis_structure, sheet, strip):
            begun = time.process_time()
            draw(report)
            spent.append(1000 * (time.process_time() - begun))
        each = "  ".join(f"{milliseconds:6.1f}" for milliseconds in spent)
        print(f"{'cold' if number == 0 else 'warm'}  {each}  together {sum(spent):6.1f} ms")


if __name__ == "__main__":
    main()
