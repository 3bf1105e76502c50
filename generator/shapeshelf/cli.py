"""The command line: parse, call, print, exit status. 0 fine, 1 problems in the input, 2 usage.

Each command imports what it needs when it runs: reading RDKit and mkdocs takes longer than
``cited`` may take in a pre-commit hook.
"""

import argparse
import json
import sys
from collections.abc import Iterable, Sequence
from pathlib import Path

from shapeshelf import __version__
from shapeshelf.calculation.model import Level
from shapeshelf.errors import CatalogueError, Problem, ShapeshelfError, UsageError

FINE, PROBLEMS, WRONG_USAGE = 0, 1, 2
STANDARD_INPUT = "-"


def main(arguments: Sequence[str] | None = None) -> int:
    """Run one command and return its exit status."""
    options = _parser().parse_args(arguments)
    try:
        return int(options.run(options))
    except CatalogueError as error:
        return _refuse(_as_problems(error, options), PROBLEMS)
    except UsageError as error:
        return _refuse(str(error), WRONG_USAGE)
    except ShapeshelfError as error:
        return _refuse(str(error), PROBLEMS)
    except KeyboardInterrupt:
        return _refuse("stopped", PROBLEMS)


def _parser() -> argparse.ArgumentParser:
    parser = argparse.ArgumentParser(
        prog="shapeshelf", description="A group's own reference of molecular shape."
    )
    parser.add_argument("--version", action="version", version=f"shapeshelf {__version__}")
    commands = parser.add_subparsers(required=True, metavar="COMMAND")
    build = _command(commands, "build", _build, "build the site from the catalogue")
    build.add_argument("--strict", action="store_true", help="warnings stop the build")
    build.add_argument("--for-files", action="store_true", help="to be opened from a folder")
    serve = _command(commands, "serve", _serve, "show the site and follow changes")
    serve.add_argument("--address", default="127.0.0.1:8000", metavar="HOST:PORT")
    for command in (build, serve):
        command.add_argument("--config", type=Path, default=Path("mkdocs.yml"))
    check = _command(commands, "check", _check, "report every problem in the catalogue")
    check.add_argument("--catalogue", type=Path, default=Path("compounds"))
    check.add_argument("--json", action="store_true")
    assess = _command(commands, "assess", _assess, "work out one structure")
    assess.add_argument(
        "structure", help="a SMILES string, a .xyz, .mol or .sdf file, or - for one a line"
    )
    assess.add_argument("--json", action="store_true")
    _compute_command(commands)
    _linking_commands(commands)
    return parser


def _compute_command(commands: "argparse._SubParsersAction[argparse.ArgumentParser]") -> None:
    compute = _command(commands, "compute", _compute, "compute missing and stale records")
    compute.add_argument("ids", nargs="*", metavar="ID", help="entries; all where none is named")
    compute.add_argument("--basis", choices=["auto", *Level], default="auto")
    compute.add_argument("--jobs", type=int, default=1, metavar="N", help="how many side by side")
    compute.add_argument("--scheduler", metavar="ADDRESS", help="of a Dask cluster")
    compute.add_argument("--again", action="store_true", help="also what has a record")
    compute.add_argument("--catalogue", type=Path, default=Path("compounds"))


def _linking_commands(commands: "argparse._SubParsersAction[argparse.ArgumentParser]") -> None:
    draft = _command(commands, "draft", _draft, "write an entry to fill in, or one a line of a CSV")
    draft.add_argument("structure", help="a SMILES, a .xyz, .mol or .sdf file, or a .csv of many")
    draft.add_argument("--id", help="the permanent address; made from the name if left out")
    draft.add_argument("--name")
    cited = _command(commands, "cited", _cited, "hold protocols against the present values")
    cited.add_argument("paths", nargs="+", type=Path, metavar="PATH")
    cited.add_argument("--values", type=Path, help="values.json of a built site")
    cited.add_argument("--site", action="append", default=[], metavar="URL")
    release = _command(commands, "release", _release, "publish the present values")
    for command in (draft, release):
        command.add_argument("--catalogue", type=Path, default=Path("compounds"))
    for command in (draft, cited, release):
        command.add_argument("--json", action="store_true")


def _command(
    commands: "argparse._SubParsersAction[argparse.ArgumentParser]",
    name: str,
    run: object,
    help_text: str,
) -> argparse.ArgumentParser:
    command = commands.add_parser(name, help=help_text, description=help_text)
    command.set_defaults(run=run)
    return command


def _build(options: argparse.Namespace) -> int:
    from shapeshelf.plugin import build_site

    build_site(options.config, options.strict, options.for_files)
    return FINE


def _serve(options: argparse.Namespace) -> int:
    from shapeshelf.plugin import serve_site

    serve_site(options.config, options.address)
    return FINE


def _check(options: argparse.Namespace) -> int:
    from shapeshelf.linking.releasing import present_values
    from shapeshelf.linking.telling import withdrawn_lines
    from shapeshelf.report.checking import record_notes, report_on_catalogue

    catalogue, reports = report_on_catalogue(options.catalogue)
    present = present_values(catalogue, reports)
    notes = record_notes(catalogue, reports)
    if options.json:
        withdrawn = sorted(present.published.withdrawn)
        _print_json(
            {"problems": [], "compounds": len(reports), "withdrawn": withdrawn, "records": notes}
        )
    else:
        print(*notes, sep="\n", end="\n" if notes else "")
        print(*withdrawn_lines(present), sep="\n", end="\n" if present.published.withdrawn else "")
        print(f"{len(reports)} compounds, {len(catalogue.sources)} sources: no problems")
    return FINE


def _compute(options: argparse.Namespace) -> int:
    from shapeshelf.calculation.computing import compute
    from shapeshelf.catalogue.reading import read_catalogue

    if options.jobs < 1:
        raise UsageError(f"--jobs {options.jobs}: at least 1 is needed")
    level = None if options.basis == "auto" else Level(options.basis)
    catalogue = read_catalogue(options.catalogue)
    whole = compute(catalogue, options.ids, level, options.jobs, options.scheduler, options.again)
    return FINE if whole else PROBLEMS


def _assess(options: argparse.Namespace) -> int:
    if options.structure == STANDARD_INPUT:
        return _assess_lines(sys.stdin, options.json)
    from shapeshelf.report.building import report_on_structure
    from shapeshelf.report.json import report_json
    from shapeshelf.report.text import report_text

    report = report_on_structure(options.structure)
    if options.json:
        _print_json(report_json(report))
    else:
        print(report_text(report))
    return FINE


def _assess_lines(lines: Iterable[str], as_json: bool) -> int:
    from shapeshelf.report.building import report_on_structure
    from shapeshelf.report.json import report_json
    from shapeshelf.report.text import report_text

    status = FINE
    for line in lines:
        text = line.strip()
        try:
            report = report_on_structure(text)
        except ShapeshelfError as error:
            status = PROBLEMS
            _print_failure(text, str(error), as_json)
            continue
        if as_json:
            _print_json(report_json(report))
        else:
            print(report_text(report), end="\n\n")
    return status


def _draft(options: argparse.Namespace) -> int:
    from shapeshelf.linking.draft_table import draft_one_or_many
    from shapeshelf.linking.drafting import Wanted, taken_in

    wanted = Wanted(options.structure, options.name, options.id)
    drafted = draft_one_or_many(wanted, options.catalogue, taken_in(options.catalogue))
    if options.json:
        written = [str(path) for path in drafted.written]
        _print_json({"written": written, "problems": _problem_rows(drafted.problems)})
    else:
        print(*drafted.written, sep="\n")
        print(*drafted.problems, sep="\n", end="\n" if drafted.problems else "", file=sys.stderr)
    return PROBLEMS if drafted.problems else FINE


def _cited(options: argparse.Namespace) -> int:
    from shapeshelf.linking.citing import check_paths, finding_json, present_reference

    reference, notes = present_reference(options.values, options.site)
    checked = check_paths(reference, options.paths)
    if options.json:
        rows = [finding_json(finding) for finding in checked.findings]
        _print_json({"links": checked.links, "numbers": checked.numbers, "findings": rows})
    else:
        print(*notes, sep="\n", end="\n" if notes else "", file=sys.stderr)
        print(*checked.findings, sep="\n", end="\n" if checked.findings else "")
    return PROBLEMS if checked.findings else FINE


def _release(options: argparse.Namespace) -> int:
    from shapeshelf.linking.releasing import release
    from shapeshelf.linking.telling import change_lines, summary, withdrawn_lines

    present = release(options.catalogue)
    changes = list(change_lines(present.comparison))
    if options.json:
        withdrawn = sorted(present.published.withdrawn)
        _print_json({"changes": changes, "withdrawn": withdrawn, "summary": summary(present)})
    else:
        print(*changes, *withdrawn_lines(present), summary(present), sep="\n")
    return FINE


def _print_failure(text: str, message: str, as_json: bool) -> None:
    if as_json:
        _print_json({"input": text, "error": message})
    else:
        print(message, file=sys.stderr)


def _print_json(value: object) -> None:
    print(json.dumps(value, ensure_ascii=False), flush=True)


def _as_problems(error: CatalogueError, options: argparse.Namespace) -> str:
    if not getattr(options, "json", False):
        return str(error)
    _print_json({"problems": _problem_rows(error.problems)})
    return ""


def _problem_rows(problems: Iterable[Problem]) -> list[dict[str, str]]:
    fields = ("file", "line", "field", "message")
    return [{name: str(getattr(problem, name)) for name in fields} for problem in problems]


def _refuse(message: str, status: int) -> int:
    if message:
        print(message, file=sys.stderr)
    return status


if __name__ == "__main__":
    sys.exit(main())
