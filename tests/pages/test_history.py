import subprocess
from pathlib import Path

from shapeshelf.pages.history import last_changes


def test_the_last_commit_of_each_file_is_found(tmp_path: Path) -> None:
    """A file changed twice shows the later day."""
    _git(tmp_path, "init", "-q")
    _commit(tmp_path, "a.yml", "one", "2024-01-02T12:00:00+0000")
    _commit(tmp_path, "b é.yml", "one", "2024-02-03T12:00:00+0000")
    _commit(tmp_path, "a.yml", "two", "2024-03-04T12:00:00+0000")
    changes = last_changes(tmp_path)
    root = tmp_path.resolve()
    assert changes[root / "a.yml"].date == "2024-03-04"
    assert changes[root / "b é.yml"].date == "2024-02-03"


def test_a_folder_outside_version_control_has_no_changes(tmp_path: Path) -> None:
    """A group that keeps no history still gets its site."""
    assert last_changes(tmp_path) == {}


def _commit(folder: Path, name: str, text: str, date: str) -> None:
    (folder / name).write_text(text)
    _git(folder, "add", name)
    _git(folder, "commit", "-q", "-m", text, f"--date={date}", date=date)


def _git(folder: Path, *arguments: str, date: str = "2024-01-01T00:00:00+0000") -> None:
    person = {
        f"GIT_{who}_{what}": "bench"
        for who in ("AUTHOR", "COMMITTER")
        for what in ("NAME", "EMAIL")
    }
    subprocess.run(
        ["git", "-C", str(folder), *arguments],
        check=True,
        env={"PATH": "/usr/bin:/bin", "HOME": str(folder), "GIT_COMMITTER_DATE": date, **person},
    )
