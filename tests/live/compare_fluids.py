#!/usr/bin/env python3
"""Compares lines through 40 and 100 degC with fluids of reference libraries, live.

    python3 compare_fluids.py COMMAND [ARGUMENT ...]

COMMAND reads JSON Lines from its standard input and answers them on its standard output, as
`filmwright work --batch -` does. Heat-transfer oils and a silicone come from the incompressible
library of CoolProp, n-alkanes up to n-dodecane from its equations of state, longer ones from the
correlations of `thermo`. Prints the error of the line at each temperature, in per cent, as rows
for a table; exit code 1 where an error is larger than a line of that kind may have, 2 where the
comparison could not be made.

A line is meant to be good between its points; outside them the errors printed are the lesson,
and the limits only keep the program from getting worse.
"""

import json
import subprocess
import sys

try:
    from CoolProp.CoolProp import PropsSI
    from thermo.chemical import Chemical
except ImportError:
    sys.exit("missing: pip install CoolProp==8.0.0 thermo==0.6.1")

POINTS = (40.0, 100.0)
AT = (0.0, 20.0, 60.0, 80.0, 120.0, 150.0)

# Largest error in per cent, at each temperature of AT.
HYDROCARBON = (30.0, 8.0, 2.0, 2.0, 2.0, 5.0)
ALKANE = (3.0, 1.0, 1.0, 1.0, 1.5, 4.0)
SILICONE = (25.0, 8.0, 3.0, 3.0, 4.0, 8.0)

INCOMPRESSIBLE = [
    ("paraffinic heat-transfer oil", "PHE", HYDROCARBON),
    ("mineral heat-transfer oil", "TX22", HYDROCARBON),
    ("dense heat-transfer oil", "PHR", HYDROCARBON),
    ("synthetic hydrocarbon", "PGLT", HYDROCARBON),
    ("hydrogenated terphenyl", "T66", HYDROCARBON),
    ("dimethyl silicone", "S800", SILICONE),
]
PURE = [("n-octane", "n-Octane"), ("n-decane", "n-Decane"), ("n-dodecane", "n-Dodecane")]
LONG = [("n-hexadecane", "hexadecane"), ("n-octadecane", "octadecane")]


def incompressible(name, t_c):
    """Kinematic viscosity, mm2/s."""
    state = ("T", t_c + 273.15, "P", 1e6, f"INCOMP::{name}")
    return PropsSI("V", *state) / PropsSI("D", *state) * 1e6


def liquid(name, t_c):
    """The same of a saturated liquid; none above the critical point."""
    state = ("T", t_c + 273.15, "Q", 0, name)
    return PropsSI("V", *state) / PropsSI("D", *state) * 1e6


def correlated(name, t_c):
    """The same by the correlations of thermo; none below the melting point."""
    fluid = Chemical(name, T=t_c + 273.15)
    if fluid.phase != "l" or not fluid.mul or not fluid.rhol:
        raise ValueError(f"{name} is no liquid at {t_c} degC")
    return fluid.mul / fluid.rhol * 1e6


def fluids():
    """Name, viscosity as a function, limits, source."""
    for name, key, limits in INCOMPRESSIBLE:
        yield name, lambda t, key=key: incompressible(key, t), limits, "CoolProp"
    for name, key in PURE:
        yield name, lambda t, key=key: liquid(key, t), ALKANE, "CoolProp"
    for name, key in LONG:
        yield name, lambda t, key=key: correlated(key, t), HYDROCARBON, "thermo"


def known(viscosity, t_c):
    """None where the library does not reach."""
    try:
        nu = viscosity(t_c)
    except ValueError:
        return None
    return nu if 0.0 < nu < 1e6 else None


def ask(command, questions):
    lines = [json.dumps({"relation": "viscosity-at", "with": w}) for w in questions]
    run = subprocess.run(
        command, input="\n".join(lines) + "\n", capture_output=True, text=True, check=False
    )
    answers = [json.loads(line) for line in run.stdout.splitlines()]
    if len(answers) != len(lines) or any("result" not in a for a in answers):
        print(f"{len(lines)} lines asked, {len(answers)} answered\n{run.stdout}{run.stderr}",
              file=sys.stderr)
        sys.exit(2)
    return [a["result"]["nu"]["value"] for a in answers]


def errors(command, viscosity):
    """Error of the line at each temperature, a share; none where the library does not reach."""
    ends = [known(viscosity, t) for t in POINTS]
    if None in ends:
        print("a fluid has no viscosity at 40 or 100 degC", file=sys.stderr)
        sys.exit(2)
    points = [f"{nu!r} mm2/s at {t} degC" for nu, t in zip(ends, POINTS)]
    theirs = [known(viscosity, t) for t in AT]
    asked = [{"points": points, "at": f"{t} degC"} for t, nu in zip(AT, theirs) if nu]
    ours = iter(ask(command, asked))
    return [next(ours) / nu - 1.0 if nu else None for nu in theirs]


def main():
    command = sys.argv[1:]
    if not command:
        print(__doc__, file=sys.stderr)
        return 2
    good = True
    heads = " | ".join(f"{t:.0f} degC" for t in AT)
    print(f"| fluid | library | {heads} |")
    print("|---|---|" + "---|" * len(AT))
    for name, viscosity, limits, source in fluids():
        cells = []
        for error, limit in zip(errors(command, viscosity), limits):
            if error is None:
                cells.append("")
                continue
            far = abs(100.0 * error) > limit
            good = good and not far
            cells.append(f"{100.0 * error:+.1f} %" + (" TOO FAR" if far else ""))
        print(f"| {name} | {source} | " + " | ".join(cells) + " |")
    return 0 if good else 1


if __name__ == "__main__":
    sys.exit(main())
