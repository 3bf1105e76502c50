"""The command line: parse, call, print, exit status. 0 fine, 1 problems in the input, 2 usage."""

import argparse
import json
import sys
from collections.abc import Iterable, Sequence
from pathlib import Path

from shapeshelf import __version__
from shapeshelf.errors import CatalogueError, ShapeshelfError, UsageError
from shapeshelf.report.building import report_on_structure
from shapeshelf.report.checking import report_on_catalogue
from shapeshelf.report.json import report_json
from shapeshelf.report.text import report_text

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
    return parser


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
    from shapeshelf.plugin import build_site  # mkdocs takes 0.3 s to load; assess needs none

    build_site(options.config, strict=options.strict)
    return FINE


def _serve(options: argparse.Namespace) -> int:
    from shapeshelf.plugin import serve_site  # as above

    serve_site(options.config, options.address)
    return FINE


def _check(options: argparse.Namespace) -> int:
    catalogue, reports = report_on_catalogue(options.catalogue)
    if options.json:
        _print_json({"problems": [], "compounds": len(reports)})
    else:
        print(f"{len(reports)} compounds, {len(catalogue.sources)} sources: no problems")
    return FINE


def _assess(options: argparse.Namespace) -> int:
    if options.structure == STANDARD_INPUT:
        return _assess_lines(sys.stdin, options.json)
    report = report_on_structure(options.structure)
    if options.json:
        _print_json(report_json(report))
    else:
        print(report_text(report))
    return FINE


def _assess_lines(lines: Iterable[str], as_json: bool) -> int:
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
    fields = ("file", "line", "field", "message")
    rows = [{name: str(getattr(p, name)) for name in fields} for p in error.problems]
    _print_json({"problems": rows})
    return ""


def _refuse(message: str, status: int) -> int:
    if message:
        print(message, file=sys.stderr)
    return status


if __name__ == "__main__":
    sys.exit(main())
