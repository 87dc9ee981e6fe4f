"""What general-purpose classifiers make of the same plots: each sees every plant.

scikit-learn is an optional extra of this project; without it the proof runs and says so.
"""

from __future__ import annotations

import importlib
import importlib.util
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.prepare import Floats

Whole = NDArray[np.int64]
MISSING = (
    "scikit-learn is not installed, so there is nothing to compare with: "
    'pip install "beltbook[proof]"'
)
NAMES = (
    "random_forest",
    "logistic_regression",
    "naive_bayes",
    "nearest_neighbours",
    "tree_depth_6",
)
TREES = 300


def available() -> bool:
    """Is scikit-learn there?"""
    return importlib.util.find_spec("sklearn") is not None


def models(seed: int) -> dict[str, Any]:
    """The five rivals, by name."""
    load = importlib.import_module
    forest = load("sklearn.ensemble").RandomForestClassifier
    linear = load("sklearn.linear_model").LogisticRegression
    bayes = load("sklearn.naive_bayes").BernoulliNB
    near = load("sklearn.neighbors").KNeighborsClassifier
    tree = load("sklearn.tree").DecisionTreeClassifier
    return {
        "random_forest": forest(TREES, random_state=seed),
        "logistic_regression": linear(C=0.1, max_iter=500),
        "naive_bayes": bayes(binarize=0.0),
        "nearest_neighbours": near(5),
        "tree_depth_6": tree(max_depth=6, random_state=seed),
    }


def beliefs_of(
    steps: NDArray[np.int8], zone: Whole, test: NDArray[np.int8], zones: int, seed: int
) -> dict[str, Floats]:
    """Each rival's probabilities for the test plots, [plot, zone].

    steps, test  [plot, plant] cover step, -1 where not found; trained on 1 + step alone
    """
    made = {}
    nearest = min(5, len(zone))
    for name, model in models(seed).items():
        if name == "nearest_neighbours":
            model.set_params(n_neighbors=nearest)
        model.fit(steps + 1, zone)
        belief = np.zeros((len(test), zones))
        belief[:, model.classes_] = model.predict_proba(test + 1)
        made[name] = belief
    return made
