from shapeshelf.catalogue.model import Source
from shapeshelf.pages.drawings import shape_glyph
from shapeshelf.pages.shapes import overview, shape_views
from shapeshelf.reference.shapes import SHAPES
from shapeshelf.report.model import CompoundReport


def test_overview_puts_a_compound_by_neighbours_and_lone_pairs(sf4: CompoundReport) -> None:
    """Four neighbours and one lone pair; other shapes are there without a compound."""
    table = overview([sf4])
    cells = {
        (neighbours, pairs): cell.shapes
        for neighbours, row in table.rows
        for pairs, cell in zip(table.lone_pairs, row, strict=True)
    }
    held = {key: shapes for key, shapes in cells.items() if any(n for _, _, n in shapes)}
    assert held == {(4, 1): (("see-saw", "shapes/see-saw/", 1),)}
    assert cells[3, 2] == (("T-shaped", "shapes/t-shaped/", 0),)
    assert cells[8, 3] == ()
    assert [neighbours for neighbours, _ in table.rows] == [2, 3, 4, 5, 6, 7, 8, 9]


def test_every_known_shape_has_a_page_even_without_a_compound(
    sf4: CompoundReport, sources: dict[str, Source]
) -> None:
    """A link to a shape never breaks because the last compound of it has left."""
    views = {view.name: view for view in shape_views([sf4], sources)}
    assert set(views) == {known.shape for known in SHAPES.values()}
    assert views["see-saw"].compounds == 1
    assert views["octahedral"].members == ()


def test_equivalent_centres_count_once(sf4: CompoundReport, sources: dict[str, Source]) -> None:
    """The compound stands once on the page of its shape."""
    (member,) = {view.name: view for view in shape_views([sf4], sources)}["see-saw"].members
    assert member.address == "compounds/sf4/"
    assert [angle.plain_label for angle in member.angles] == ["F(ax)-S-F(ax)", "F(eq)-S-F(eq)"]


def test_the_scale_leads_to_its_compounds(sf4: CompoundReport, sources: dict[str, Source]) -> None:
    """One line a compound, with the way to it from the page of the shape."""
    (row,) = {view.name: view for view in shape_views([sf4], sources)}["see-saw"].scale
    assert (row.name, row.address) == ("Sulfur tetrafluoride", "../../compounds/sf4/")
    assert (173.1, "measured") in row.points


def test_only_arrangements_that_lead_to_a_shape_are_named(
    sf4: CompoundReport, sources: dict[str, Source]
) -> None:
    """Those of the table below them, which tells how each does."""
    views = {view.name: view for view in shape_views([sf4], sources)}
    for view in views.values():
        if view.ways:
            assert set(view.arrangements) == {way.arrangement for way in view.ways}
    assert views["see-saw"].arrangements == ("trigonal bipyramidal",)


def test_a_glyph_may_stand_several_times_on_a_page() -> None:
    """It has no id, and a screen reader passes over it: the name stands beside it."""
    markup = shape_glyph("see-saw")
    assert markup.startswith("<svg ")
    assert 'aria-hidden="true"' in markup
    for left_out in ("id=", "<title", "<desc", "role=", "labelledby"):
        assert left_out not in markup
