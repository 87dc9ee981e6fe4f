"""The key of a region on simulated sites: observers, verdicts, three looks, disturbed ground."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk import VERDICTS, call_plots
from builder.key.call import call_three
from builder.key.compile import Fitted
from builder.key.compile_plants import arrivals
from builder.key.context import context_of, disturbance_of
from builder.key.defaults import SESSION
from builder.key.plots import Plots
from builder.key.prepare import Key, Pack
from builder.proof import simulator
from builder.proof.calls import ASK_ON, call_sites, pack_for, record_of, with_settings, without_zone
from builder.proof.cases import Case, Traits, proof_cases, setting_cases
from builder.proof.known_proof import confusion
from builder.proof.measures import area_under_curve, calibration_rows, figures
from builder.proof.thresholds import fit_lines, measures, thin_line
from builder.tables import Region

Whole = NDArray[np.int64]
Tell = Callable[[str, float], None]
SITES = 480
SETTING_SITES = 480
BLIND_ZONES = 6
BLIND_SITES = 60
USUAL_SITES = 60
THREE_SITES = 120
ANSWERS = 8
OBSERVERS = {
    "careful": simulator.CAREFUL,
    "forgetful": simulator.FORGETFUL,
    "mistaken": simulator.MISTAKEN,
}
POOR_KEPT, POOR_WEEDS = 0.06, 0.02
"""Thin cases: one find in sixteen is left, and a weed now and then."""


class SimulatedProof:
    """A region's key, the zones it is blinded for, and what simulated sites say of it."""

    def __init__(self, region: Region, fitted: Fitted | None, seed: int, tell: Tell) -> None:
        self.region, self.fitted, self.tell = region, fitted, tell
        self.rng = np.random.default_rng(seed)
        self.traits = Traits(
            [plant.layer for plant in region.plants], [plant.response for plant in region.plants]
        )
        tell("weigh", 0.0)
        self.pack, self.arrays = pack_for(region, fitted)
        self.blind = self._blinded() if fitted is None else []
        self.session = self._refit() if fitted is None else {}
        self.key = with_settings(self.pack, self.session)
        self.asking_on = with_settings(self.pack, {**self.session, **ASK_ON})

    def figures(self) -> dict[str, Any]:
        """Everything simulated sites say, as plain values."""
        self.tell("observers", 0.0)
        observers = {name: self._observer(person) for name, person in OBSERVERS.items()}
        main = observers["forgetful"]
        self.tell("verdicts", 0.0)
        verdicts, auc = self._verdicts()
        self.tell("three looks", 0.0)
        made = {
            "tested_on": "simulated",
            "set": f"simulated sites of {self.region.id}",
            "zones": len(self.region.zones),
            "plants": len(self.region.plants),
            "answers": ANSWERS,
            **main,
            "observers": {
                name: {
                    one: row[one] for one in ("n", "hit_rate", "log_loss_nats", "answers_median")
                }
                for name, row in observers.items()
            },
            "verdicts": verdicts,
            "withheld_auc": auc,
            "three_looks": self._three_looks(),
        }
        self.tell("disturbed", 0.0)
        made["disturbed"] = self._disturbed()
        made["out_of_season"] = self._out_of_season()
        return made

    def _blinded(self) -> list[tuple[int, Pack]]:
        """Keys that do not know one of the zones."""
        zones = self.region.zones
        chosen = np.unique(np.linspace(0, len(zones) - 1, min(BLIND_ZONES, len(zones))).astype(int))
        made = []
        for turn, z in enumerate(chosen if len(zones) > 2 else []):
            self.tell("blinded keys", turn / len(chosen))
            pack, _ = pack_for(without_zone(self.region, zones[int(z)].id), None, USUAL_SITES)
            made.append((int(z), pack))
        return made

    def _refit(self) -> dict[str, Any]:
        """Verdict lines and thin, on cases of the setting generator."""
        session: dict[str, Any] = {}
        for turn in range(2):
            self.tell("thresholds", turn / 2)
            key = with_settings(self.pack, {**session, **ASK_ON})
            made = setting_cases(key, self.arrays, self.traits, self.rng, SETTING_SITES)
            told = {name: call_sites(key, case.plots, ANSWERS) for name, case in made.items()}
            cases = {name: measures(key, calls) for name, calls in told.items()}
            foreign = []
            for z, pack in self.blind:
                blind = with_settings(pack, {**session, **ASK_ON})
                rows = np.flatnonzero(made["zone"].zones[:, 0] == z)
                if len(rows):
                    calls = call_sites(blind, made["zone"].plots.take(rows), ANSWERS)
                    foreign.append(measures(blind, calls))
            if foreign:
                cases["misfit"] = np.concatenate(foreign)
            session = dict(fit_lines(cases))
            sound = told["zone"]
            line = thin_line(sound.finds_cb, sound.stated, SESSION["thin"])
            session["thin"] = {**SESSION["thin"], "finds_cb": line}
        return session

    def _world(self) -> simulator.World:
        return simulator.world_of(
            self.arrays, self.traits.layer, self.traits.response, self.rng, self._behind()
        )

    def _behind(self) -> float:
        return float(np.median(self.arrays.plots))

    def _observer(self, person: simulator.Person) -> dict[str, Any]:
        """Hit rate and calibration of sites inside a zone, by one kind of observer."""
        case = self._cases(person)["zone"]
        calls, true = call_sites(self.key, case.plots, ANSWERS), case.zones[:, 0]
        made = figures(calls.belief, true, self.rng, calls.asked)
        right = calls.leader == true
        return made | {
            "calibration": calibration_rows(calls.stated, right, self.rng),
            "confusion": confusion(calls.leader, true, self.key.zones),
            "answers_needed": np.bincount(calls.asked, minlength=ANSWERS + 1).tolist(),
        }

    def _cases(self, person: simulator.Person = simulator.FORGETFUL) -> dict[str, Case]:
        return proof_cases(self.asking_on, self.arrays, self.traits, self.rng, SITES, person)

    def _verdicts(self) -> tuple[dict[str, Any], float | None]:
        made, foreign = {}, []
        cases = self._cases()
        for name, case in cases.items():
            calls = call_sites(self.asking_on, case.plots, ANSWERS)
            made[name] = _shares(calls.verdict)
            if name == "zone":
                sound = calls.fit
        said = []
        for z, pack in self.blind:
            key = with_settings(pack, {**self.session, **ASK_ON})
            zones = np.full(BLIND_SITES, z)
            drawn = simulator.pure(self._world(), zones, self.rng)
            plots = simulator.observe(*drawn, simulator.FORGETFUL, self.rng)
            calls = call_sites(key, plots, ANSWERS)
            foreign.append(calls.fit)
            said.append(calls.verdict)
        if said:
            made["misfit"] = _shares(np.concatenate(said))
        made["thin"] = _shares(call_sites(self.asking_on, self._poor(), ANSWERS).verdict)
        auc = area_under_curve(sound, np.concatenate(foreign)) if foreign else None
        return made, None if auc is None else round(auc, 4)

    def _poor(self) -> Plots:
        zones = self.rng.integers(self.key.zones, size=SITES)
        present, cover = simulator.pure(self._world(), zones, self.rng)
        kept = np.full(self.key.plants, POOR_KEPT)
        weeds = np.array([plant.weed != "none" for plant in self.region.plants])
        left = simulator.remnants(present, kept, np.where(weeds, POOR_WEEDS, 0.0), self.rng)
        return simulator.observe(left, cover, simulator.FORGETFUL, self.rng)

    def _three_looks(self) -> dict[str, Any]:
        """A plot and two spots with the stand question answered as settings.stand says."""
        made = {}
        cases = self._cases()
        for name, case in cases.items():
            rows = self.rng.permutation(len(case.zones))[:THREE_SITES]
            looks = [(self.asking_on, case.plots.take(rows), ANSWERS)]
            looks += [(self.asking_on, *self._spots(case.zones[rows, side])) for side in (0, 1)]
            made[name] = _shares(self._judged(looks, name))
        said = []
        for z, pack in self.blind:
            key = with_settings(pack, {**self.session, **ASK_ON})
            zones = np.full(-(-THREE_SITES // len(self.blind)), z)
            looks = [(key, self._spots(zones)[0], ANSWERS)]
            looks += [(key, *self._spots(zones)) for _ in (0, 1)]
            said.append(self._judged(looks, "misfit"))
        if said:
            made["misfit"] = _shares(np.concatenate(said))
        poor = [self._poor().take(np.arange(THREE_SITES)) for _ in range(3)]
        made["thin"] = _shares(
            self._judged([(self.asking_on, plots, ANSWERS) for plots in poor], "zone")
        )
        return made

    def _judged(self, looks: list[tuple[Key, Plots, int]], name: str) -> Whole:
        """Verdicts of three looks each; name: the truth, which decides what people say."""
        stand = self.key.settings["stand"][name]
        words, chances = list(stand), list(stand.values())
        heard = [call_sites(key, plots, answers).heard for key, plots, answers in looks]
        said = []
        for at in range(len(looks[0][1])):
            word = words[int(self.rng.choice(len(words), p=chances))]
            one, two, three = (
                record_of(key, told, plots, at)
                for (key, plots, _), told in zip(looks, heard, strict=True)
            )
            verdict = call_three(looks[0][0].pack, one, two, three, word)["verdict"]
            said.append(VERDICTS.index(verdict))
        return np.array(said)

    def _spots(self, zones: Whole) -> tuple[Plots, int]:
        """Sites inside zones, and how many answers a spot is given."""
        look = self.key.settings["look_again"]
        drawn = simulator.pure(self._world(), zones, self.rng)
        plots = simulator.observe(*drawn, simulator.FORGETFUL, self.rng)
        return plots, look["named"] + look["prompts"]

    def _disturbed(self) -> dict[str, Any]:
        """Wrong calls stated at .8 and more, by disturbance; what is kept differs by site."""
        made = {}
        inside = self.arrays.present > 0
        come = arrivals(self.region, inside)
        for one in self.region.disturbances:
            context = context_of(self.key, {"disturbance": one.id})
            known = disturbance_of(self.key, {"disturbance": one.id}) or {}
            if not context.disturbed:
                continue
            zones = self.rng.integers(self.key.zones, size=SITES)
            present, cover = simulator.pure(self._world(), zones, self.rng)
            harm = self.rng.uniform(0.6, 1.6, (SITES, 1))
            kept = (context.kept / 4.0) ** harm
            times = _newcomer_level(self.key, context.newcomer)
            comes = times * come[:, zones].T * self.rng.uniform(0.5, 1.5, (SITES, 1))
            comes = np.where(context.sown, 0.35, comes)
            left = simulator.remnants(present, kept, comes, self.rng)
            plots = simulator.observe(left, cover, simulator.FORGETFUL, self.rng)
            calls = call_plots(self.key.pack, plots, answers=ANSWERS, disturbance=one.id)
            ids = np.array([zone.id for zone in self.region.zones])
            right = np.array(calls["zone_id"]) == ids[zones]
            high = np.array(calls["belief"]) >= 0.8
            made[one.id] = {
                "n": SITES,
                "hit_rate": round(float(right.mean()), 4),
                "wrong_at_80": round(float((high & ~right).mean()), 4),
                "thin": round(float(np.mean(np.array(calls["verdict"]) == "thin")), 4),
                "dug": bool(known.get("dug")),
            }
        return made

    def _out_of_season(self) -> dict[str, Any]:
        """Hit rate by month, with plants gone that cannot be recognised then."""
        made = {}
        for month in (2, 5, 7, 10):
            seen = context_of(self.key, {"month": month}).seen
            zones = self.rng.integers(self.key.zones, size=SITES)
            drawn = simulator.pure(self._world(), zones, self.rng)
            plots = simulator.observe(*drawn, simulator.FORGETFUL, self.rng)
            plots = simulator.out_of_season(plots, seen == 0)
            calls = call_sites(self.key, plots, ANSWERS, {"month": month})
            made[str(month)] = round(float((calls.leader == zones).mean()), 4)
        return made


def _newcomer_level(key: Key, level: int) -> float:
    levels = key.pack["evidence"]["newcomer"]["levels"]
    return float(levels[level]) if level >= 0 else 0.0


def _shares(said: Whole) -> dict[str, Any]:
    made: dict[str, Any] = {
        verdict: round(float((said == v).mean()), 4) for v, verdict in enumerate(VERDICTS)
    }
    return made | {"n": len(said)}
