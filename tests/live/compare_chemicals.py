#!/usr/bin/env python3
"""Compares viscosity index and Saybolt seconds with the `chemicals` library, live.

    python3 compare_chemicals.py COMMAND [ARGUMENT ...]

COMMAND reads JSON Lines from its standard input and answers them on its standard output, as
`filmwright work --batch -` does. One thousand random oils: 2 to 2000 mm2/s at 40 degC, index -50
to 350, the same ones every time. Prints the worst difference of each kind; exit code 1 where one
is too large, 2 where the comparison could not be made.

What the library does otherwise and is allowed for here: its viscosities are kinematic, in m2/s;
its rounding turns an exact whole number down by one, so the unrounded index is compared and
rounded here; at exactly 70 mm2/s it takes the equations where the standard still takes the table.
"""

import json
import random
import subprocess
import sys

try:
    from chemicals.viscosity import viscosity_converter, viscosity_index
except ImportError:
    sys.exit("chemicals is not installed: pip install chemicals==1.5.2")

OILS = 1000
SEED = 20240


def ask(command, questions):
    """Answers of the command to (relation, inputs) pairs, in order."""
    lines = [json.dumps({"relation": r, "with": w}) for r, w in questions]
    run = subprocess.run(
        command, input="\n".join(lines) + "\n", capture_output=True, text=True, check=False
    )
    answers = [json.loads(line) for line in run.stdout.splitlines()]
    if len(answers) != len(lines):
        print(f"{len(lines)} lines asked, {len(answers)} answered\n{run.stderr}", file=sys.stderr)
        sys.exit(2)
    return answers


def value(answer, name):
    """A result, or none where the relation refused."""
    return answer["result"][name]["value"] if "result" in answer else None


def mm2_s(nu):
    return f"{nu!r} mm2/s"


def library_index(nu40, nu100):
    return viscosity_index(nu40 * 1e-6, nu100 * 1e-6, rounding=False)


class Worst:
    """The largest difference of each kind, against its limit."""

    def __init__(self):
        self.kinds = {}

    def note(self, kind, difference, limit, which):
        held = self.kinds.get(kind)
        if held is None or difference > held[0]:
            count = held[3] if held else 0
            self.kinds[kind] = (difference, limit, which, count + 1)
        else:
            self.kinds[kind] = held[:3] + (held[3] + 1,)

    def report(self):
        good = True
        for kind, (difference, limit, which, count) in self.kinds.items():
            mark = "ok" if difference <= limit else "TOO FAR"
            good = good and difference <= limit
            print(f"{kind:32} {count:5} compared, worst {difference:.2e} of {limit:.0e}"
                  f" ({which}) {mark}")
        return good


def draw(rng):
    """An oil by its viscosity at 40 degC and its index."""
    nu40 = 2.0 * 1000.0 ** rng.random()
    return nu40, rng.uniform(-50.0, 350.0)


def oils(command, worst):
    """Random oils whose viscosity at 100 degC exists, with that viscosity."""
    rng = random.Random(SEED)
    found = []
    while len(found) < OILS:
        drawn = [draw(rng) for _ in range(OILS)]
        questions = [("nu100-from-index", {"nu40": mm2_s(u), "vi": vi}) for u, vi in drawn]
        for (nu40, vi), answer in zip(drawn, ask(command, questions)):
            nu100 = value(answer, "nu100")
            if nu100 is None:
                # No such oil: with 2 mm2/s at 100 degC, the least allowed, the library must
                # already find a higher index.
                least = library_index(nu40, 2.0)
                worst.note("no oil of that index", max(0.0, vi - least), 1e-6, f"{nu40} {vi}")
                continue
            miss = abs(library_index(nu40, nu100) - vi)
            if abs(nu100 - 70.0) < 0.05:
                continue
            worst.note("nu100 from index, index", miss, 1e-6, f"nu40 {nu40:.6g} VI {vi:.6g}")
            found.append((nu40, vi, nu100))
    return found[:OILS]


def compare_index(command, worst, sample):
    questions = [
        ("viscosity-index", {"nu40": mm2_s(u), "nu100": mm2_s(y)}) for u, _, y in sample
    ]
    for (nu40, _, nu100), answer in zip(sample, ask(command, questions)):
        theirs = library_index(nu40, nu100)
        which = f"nu40 {nu40:.6g} nu100 {nu100:.6g}"
        worst.note("viscosity index", abs(value(answer, "vi") - theirs), 1e-7, which)
        if abs(theirs % 1.0 - 0.5) > 1e-6:
            rounded = abs(value(answer, "vi_rounded") - round(theirs))
            worst.note("viscosity index, rounded", rounded, 0.0, which)


def compare_nu40(command, worst, sample):
    questions = [("nu40-from-index", {"nu100": mm2_s(y), "vi": vi}) for _, vi, y in sample]
    for (_, vi, nu100), answer in zip(sample, ask(command, questions)):
        miss = abs(library_index(value(answer, "nu40"), nu100) - vi)
        worst.note("nu40 from index, index", miss, 1e-6, f"nu100 {nu100:.6g} VI {vi:.6g}")


def compare_saybolt(command, worst, sample):
    at = "100 degF"
    nus = [u for u, _, _ in sample]
    theirs = [
        viscosity_converter(nu * 1e-6, "kinematic viscosity", "saybolt universal") for nu in nus
    ]
    questions = [("saybolt", {"nu": mm2_s(nu), "at": at}) for nu in nus]
    for nu, sus, answer in zip(nus, theirs, ask(command, questions)):
        worst.note("Saybolt seconds, relative", abs(value(answer, "sus") / sus - 1.0), 1e-9, nu)
    questions = [("saybolt-to-nu", {"sus": f"{sus!r} SUS", "at": at}) for sus in theirs]
    for nu, answer in zip(nus, ask(command, questions)):
        worst.note("Saybolt undone, relative", abs(value(answer, "nu") / nu - 1.0), 1e-9, nu)


def main():
    command = sys.argv[1:]
    if not command:
        print(__doc__, file=sys.stderr)
        return 2
    worst = Worst()
    sample = oils(command, worst)
    compare_index(command, worst, sample)
    compare_nu40(command, worst, sample)
    compare_saybolt(command, worst, sample)
    return 0 if worst.report() else 1


if __name__ == "__main__":
    sys.exit(main())
