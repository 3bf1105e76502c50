"""The site's modules in Node: formulas, slips of the pen, sets, ranges, tables as text."""

from collections.abc import Callable
from typing import Any

import pytest

from shapeshelf.pages.packed_numbers import packed

Run = Callable[..., Any]


@pytest.mark.parametrize(
    ("text", "keys"),
    [
        ("SF4", ["F4S1/null"]),
        ("F4S", ["F4S1/null"]),
        ("SF₄", ["F4S1/null"]),
        ("sf4", ["F4S1/null"]),
        ("NO3-", ["N1O1/-3", "N1O3/-1"]),
        ("[NO3]−", ["N1O3/-1"]),
        ("SO₄²⁻", ["O4S1/-2"]),
        ("SO4 2-", ["O4S1/-2"]),
        ("SO4^2-", ["O4S1/-2"]),
        ("SO42-", ["O42S1/-1", "O4S1/-2"]),
        ("(CH3)3SiN3", ["C3H9N3Si1/null"]),
        ("[Co(NH3)6]3+", ["Co1H18N6/3"]),
        ("no2", ["N1O2/null", "No2/null"]),
        ("benzene", []),
        ("see-saw", []),
    ],
)
def test_formulas_are_read_in_any_order_and_script(in_node: Run, text: str, keys: list[str]):
    """Compositions with alphabetical keys; charges as people write them."""
    script = """
      import { readFormula } from "./js/formula.js";
      tell(readFormula(given).map(({ key, charge }) => `${key}/${charge}`));
    """
    assert sorted(in_node(script, text)) == sorted(keys)


def test_slips_of_the_pen_are_counted(in_node: Run):
    """Swapped neighbours are one slip; the end of a longer name costs nothing."""
    cases = [
        ["flouride", "fluoride", 2, 1],
        ["sulfer", "sulfur tetrafluoride", 2, 1],
        ["xenon", "argon", 1, 2],
        ["amonia", "ammonia", 1, 1],
        ["ammmonia", "ammonia", 1, 1],
        ["tetrafluroborate", "tetrafluoroborate", 2, 1],
        ["abcd", "dcba", 2, 3],
    ]
    script = """
      import { distance } from "./js/slips.js";
      tell(given.map(([typed, held, limit]) => distance(typed, held, limit)));
    """
    assert in_node(script, cases) == [case[3] for case in cases]


@pytest.mark.parametrize(
    ("text", "folded"),
    [
        ("α,α′-Dipyridyl", "alpha alpha dipyridyl"),
        ("Sulphur hexafluoride", "sulfur hexafluoride"),
        ("D∞h", "dinfh"),
        ("C₂ᵥ", "c2v"),
        ("Bent's rule", "bents rule"),
        ("Grüneisen", "gruneisen"),
        ("Gru\u0308neisen", "gruneisen"),
    ],
)
def test_names_are_folded_to_one_spelling(in_node: Run, text: str, folded: str):
    """Greek letters spelled out, accents and scripts plain, one spelling of sulfur."""
    script = 'import { foldedWords } from "./js/lines.js"; tell(foldedWords(given).join(" "));'
    assert in_node(script, text) == folded


@pytest.mark.parametrize(
    ("start", "found"),
    [
        ("ethyl", [0, 1]),
        ("eth", [0, 1, 3]),
        ("acetate", [1]),
        ("a", [0, 1]),
        ("yl", []),
        ("z", []),
        ("2", [3, 4]),
    ],
)
def test_words_are_found_by_their_beginning(in_node: Run, start: str, found: list[int]):
    """Every line with such a word, none where it only stands inside one."""
    script = """
      import { eachLineWith, linesOf } from "./js/lines.js";
      const { marked, starts } = linesOf(given.lines);
      const found = [];
      const begun = linesOf([given.start]).marked.trim();
      eachLineWith(marked, starts, begun, (line) => found.push(line));
      tell(found);
    """
    lines = ["ethyl alcohol", "ethyl acetate", "", "methanol ether\nmethanol 2", "2,2-"]
    assert in_node(script, {"lines": lines, "start": start}) == found


def test_lines_are_the_letters_of_many_texts(in_node: Run):
    """Run together, and with the beginnings of words marked; a text is always one line."""
    script = """
      import { linesOf, markedWords, unmarked } from "./js/lines.js";
      const { plain, marked, starts } = linesOf(given);
      tell([plain, marked, [...starts], markedWords(marked).map(unmarked)]);
    """
    plain, marked, starts, words = in_node(script, ["Xenon-difluoride", "′", "2\nα 9a", "O'Neill"])
    assert plain == "\nxenondifluoride\n\n2alpha9a\noneill\n"
    assert marked == "\nXenonDifluoride\n\n#Alpha*a\nOneill\n"
    assert starts == [1, 17, 18, 27, 34]
    assert words == ["xenon", "difluoride", "2", "alpha", "9a", "oneill"]


def test_words_are_held_with_their_lines(in_node: Run):
    """Each word once, with every line it is in; how many words a line has."""
    script = """
      import { linesOf } from "./js/lines.js";
      import { wordsIn } from "./js/words.js";
      const { list, from, lines, sizes } = wordsIn(linesOf(given).marked);
      const held = list.map((word, n) => [word, [...lines.slice(from[n], from[n + 1])]]);
      tell([Object.fromEntries(held), sizes]);
    """
    held, sizes = in_node(script, ["ethyl alcohol", "", "ethyl ethyl 2"])
    assert held == {"ethyl": [0, 2, 2], "alcohol": [0], "2": [2]}
    assert sizes == [2, 0, 3]


@pytest.mark.parametrize(
    ("one", "other", "same"),
    [("F4S1", "SF4", True), ("C2H6O", "OC2H6", True), ("SF4", "SF5", False), ("Co", "CO", False)],
)
def test_a_composition_has_one_weight(in_node: Run, one: str, other: str, same: bool):
    """Whatever the order, and whether a single atom is counted or not."""
    script = 'import { weightOf } from "./js/formula.js"; tell(given.map(weightOf));'
    left, right = in_node(script, [one, other])
    assert (left == right) is same


def test_sets_of_compounds(in_node: Run):
    """What is common, what is in either, how many; the last word is no longer than it should."""
    script = """
      import { all, common, either, none, put, shared, size } from "./js/bits.js";
      const [a, b] = [none(70), none(70)];
      for (const n of [0, 31, 32, 69]) put(a, n);
      for (const n of [31, 33, 69]) put(b, n);
      const both = [common([a, b]), either([a, b], 70)];
      tell([size(all(70)), size(all(64)), size(a), shared(a, b), ...both.map(size)]);
    """
    assert in_node(script) == [70, 64, 4, 2, 2, 5]


def test_packed_numbers_come_back(in_node: Run):
    """What Python packs the script unpacks, around every change of length."""
    numbers = [0, 1, 55, 56, 57, 1679, 1680, 1681, 1800, 48_000, 50_000]
    script = 'import { unpacked } from "./js/packed.js"; tell(unpacked(given));'
    assert in_node(script, packed(numbers)) == numbers


def test_a_spreadsheet_runs_no_cell(in_node: Run):
    """Cells that begin a formula get an apostrophe, numbers stay numbers, commas are quoted."""
    rows = [["=1+1", "+cmd", "-2.5", "@x", 'a,"b"'], ["\tx", "-", "173.1", "+4", "line\nend"]]
    script = 'import { csvText } from "./js/csv.js"; tell(csvText(given));'
    assert in_node(script, rows) == (
        '\ufeff\'=1+1,\'+cmd,-2.5,\'@x,"a,""b"""\r\n\'\tx,\'-,173.1,+4,"line\nend"\r\n'
    )


def test_the_state_of_the_lookup_survives_the_address(in_node: Run):
    """What stands in the fields comes back from the address word for word."""
    state = {
        "text": "fluoride & co",
        "chosen": {"shape": ["see-saw", "T-shaped"], "element": ["S"], "tag": ["a, b"]},
        "asked": {"angle-from": "100", "end": "F", "near": "101,6"},
        "columns": ["mass", "cas"],
        "sort": "-mass",
    }
    script = """
      import { searchFor, stateFrom } from "./js/state.js";
      tell([stateFrom(searchFor(given)), searchFor(stateFrom(""))]);
    """
    assert in_node(script, state) == [state, ""]


@pytest.mark.parametrize(
    ("a", "b", "apart"),
    [
        ((173.1, 0.5), (173.5, 0.5), False),
        ((173.1, 0.5), (174.0, 0.5), True),
        ((173.1, None), (173.1, None), False),
        ((173.1, None), (173.2, None), True),
    ],
)
def test_numbers_differ_where_they_are_further_apart_than_their_half_widths(
    in_node: Run, a: tuple[float, float | None], b: tuple[float, float | None], apart: bool
):
    """The two ± combined in quadrature."""
    cells = [[{"value": value, "uncertainty": width, "text": ""}] for value, width in (a, b)]
    script = 'import { differs } from "./js/compare-rows.js"; tell(differs(given));'
    assert in_node(script, [*cells, []]) is apart


def test_definitions_and_ids_from_an_address(in_node: Run):
    """Ids each once, six at most, nothing that is no id."""
    script = 'import { idsFrom } from "./js/compare.js"; tell(idsFrom(given));'
    search = "?ids=sf4,clf3,sf4,../x,A,b,c,d,e,f"
    assert in_node(f"globalThis.document = undefined;{script}", search) == [
        "sf4", "clf3", "b", "c", "d", "e",
    ]  # fmt: skip
