"""Library names in import lines become paths; nothing else in a script changes."""

import pytest

from builder.site.specifiers import imports_of, named_imports, relative_imports

LIBRARIES = {"preact": "app/vendor/preact.js", "preact/hooks": "app/vendor/hooks.js"}


@pytest.mark.parametrize(
    ("text", "path", "expected"),
    [
        (
            "import { h } from 'preact';",
            "app/js/main.js",
            "import { h } from '../vendor/preact.js';",
        ),
        ('import"preact/hooks"', "app/js/screens/a.js", 'import"../../vendor/hooks.js"'),
        ("import('preact')", "app/vendor/x.js", "import('./preact.js')"),
        ("export*from'preact'", "app/vendor/x.js", "export*from'./preact.js'"),
        ("import a from './b.js'", "app/js/main.js", "import a from './b.js'"),
        ("const from = 'preact';", "app/js/main.js", "const from = 'preact';"),
    ],
)
def test_libraries_are_named_by_path(text, path, expected):
    assert relative_imports(text, path, LIBRARIES) == expected


def test_a_library_nobody_fetched_is_an_error():
    with pytest.raises(KeyError):
        relative_imports("import x from 'left-out'", "app/js/main.js", LIBRARIES)


def test_paths_become_names_for_the_single_file():
    text = "import{a}from'../store/a.js';import('./b.js')"
    assert named_imports(text, "app/js/screens/x.js") == (
        "import{a}from'app/js/store/a.js';import('app/js/screens/b.js')"
    )
    assert imports_of(text) == ["../store/a.js", "./b.js"]
