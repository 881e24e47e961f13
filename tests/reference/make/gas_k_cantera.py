"""Makes ../gas_k_cantera.csv: equilibrium constants of gas reactions from the species data that Cantera ships.

    python gas_k_cantera.py --out FILE     write the table
    python gas_k_cantera.py --check FILE   make it in memory and name the first line that differs
    python gas_k_cantera.py --compare      show the difference to our own data file, in brackets without the newer data
    python gas_k_cantera.py --differences  show where the species of our own data file differ from these

Cantera's nasa_gas.yaml holds polynomials of 1993 whose entropies are for 1 bar, while the file leaves the reference
pressure at its default of 1 atm. Only the polynomials are evaluated here, H/RT - S/R at the temperature, so K is for 1 bar.
"""

import argparse
import math
import sys
from pathlib import Path

import cantera as ct

import janaf_dfg

FILE = "nasa_gas.yaml"
TEMPERATURES = (500, 800, 1000, 1300, 1600)
# Species of which newer data than these exist and are used by us: by how much our H298 (kJ/mol) and S298 (J/(mol K)) are
# higher, and our G at the five temperatures beyond what those two make of it (J/mol; that is the heat capacity).
# Typed here and not read from our data file, so that a slip in that file is not taken for newer data; --differences prints
# what the file holds now. Species not named are the same within 0.006 kJ and 0.004 J/K, and heat capacities within 15 J
# (CO2 37 J at 1600 K).
NEWER = {
    "H2": (0, 0, (3, 10, 12, 20, 34)),
    "CH4": (0, 0, (-2, -11, -18, -47, -125)),
    "NH3": (0, 0, (-2, -8, -10, -16, -29)),
    "SO2": (0.023, 0.017, (4, 22, 44, 86, 137)),
    "SO3": (-0.150, -0.227, (1, 4, 7, 5, -13)),
    "H2S": (-0.098, 0.048, (-4, -27, -53, -110, -193)),
    "S2": (0.196, -0.146, (-5, -32, -65, -123, -188)),
    "COS": (-3.301, 0.065, (-4, -2, 10, 40, 83)),
    "HCN": (-1.917, 0.001, (-2, -5, -7, -12, -24)),
}
SAME = "same data to the fit"
REACTIONS = (
    ("CO + H2O = CO2 + H2", SAME),
    ("2 CO + O2 = 2 CO2", SAME),
    ("2 H2 + O2 = 2 H2O", SAME),
    ("CH4 + H2O = CO + 3 H2", "heat capacities of CH4 and H2"),
    ("CH4 + CO2 = 2 CO + 2 H2", "heat capacities of CH4 and H2"),
    ("N2 + 3 H2 = 2 NH3", "heat capacities of NH3 and H2"),
    ("2 SO2 + O2 = 2 SO3", "SO3 by 0.15 kJ and 0.23 J/K lower; heat capacity of SO2"),
    ("2 H2S = 2 H2 + S2", "S2 by 0.20 kJ higher and 0.15 J/K lower; H2S by 0.10 kJ lower; heat capacities of H2S and S2"),
    ("4 HCl + O2 = 2 Cl2 + 2 H2O", SAME),
    ("N2 + O2 = 2 NO", SAME),
    ("COS + H2O = CO2 + H2S", "COS by 3.30 kJ and H2S by 0.10 kJ lower; heat capacities of H2S and COS"),
    ("CO + NH3 = HCN + H2O", "HCN by 1.92 kJ lower"),
)
NAMES = {"HCl": "HCL", "Cl2": "CL2"}


def terms(equation):
    """(coefficient, formula) of an equation, negative on the left."""
    out = []
    for side, sign in zip(equation.split(" = "), (-1, 1)):
        for term in side.split(" + "):
            words = term.split()
            out.append((sign * (float(words[0]) if len(words) == 2 else 1.0), words[-1]))
    return out


def make():
    species = {s.name: s.thermo for s in ct.Species.list_from_file(FILE)}

    def g(formula, t):
        thermo = species[formula if formula in species else NAMES[formula]]
        return (thermo.h(t) - t * thermo.s(t)) / (ct.gas_constant * t)

    made = []
    for equation, why in REACTIONS:
        for i, t in enumerate(TEMPERATURES):
            log_k = -sum(n * g(f, t) for n, f in terms(equation)) / math.log(10)
            newer = 0.0
            if why != SAME:
                for n, f in terms(equation):
                    h, s, cp = NEWER.get(f, (0, 0, (0,) * 5))
                    newer += n * (1000 * h - t * s + cp[i])
            made.append((equation, t, log_k, newer / 1000, why))
    return made


HEAD = f"""\
# Equilibrium constants of gas reactions from Cantera's own species data, ideal gases, standard pressure 1 bar.
# Source: {FILE} of Cantera {ct.__version__} (BSD-3), polynomials of McBride, B. J.; Gordon, S.; Reno, M. A. (1993), NASA TM-4513.
# Made by make/gas_k_cantera.py. log10_k as the equation is written.
# newer_kj: by how much newer data raise dG of the reaction, kJ, from the differences of species listed in the script; zero
# where the data are the same. why: which. K of log10_k - 1000 newer_kj / (R T ln 10) is to be met within 0.5 %.
equation,t_k,log10_k,newer_kj,why
"""


def text():
    return HEAD + "".join(f"{e},{t},{k:.5f},{d:.3f},{why}\n" for e, t, k, d, why in make())


def compare():
    records = {(r["formula"], r["class"]): r for r in janaf_dfg.read_data(janaf_dfg.DATA) if r["preferred"]}
    worst = {}
    for equation, t, log_k, newer, _ in make():
        g = 0.0
        for n, f in terms(equation):
            _, h, s = janaf_dfg.stable(records[(f, "gas")], float(t))
            g += n * (h - t * s)
        ours = -g / (8.31446261815324 * t * math.log(10))
        plain = 10 ** (ours - log_k) - 1
        off = 10 ** (ours - log_k + 1000 * newer / (8.31446261815324 * t * math.log(10))) - 1
        worst.setdefault(equation, []).append(f"{100 * off:+.2f} % ({100 * plain:+.1f})" + ("" if abs(off) <= 0.005 else " OUTSIDE"))
    for equation, offs in worst.items():
        print(f"{equation:28}", " ".join(f"{o:>16}" for o in offs))


def differences():
    records = {(r["formula"], r["class"]): r for r in janaf_dfg.read_data(janaf_dfg.DATA) if r["preferred"]}
    species = {s.name: s.thermo for s in ct.Species.list_from_file(FILE)}
    for f in sorted({f for e, _ in REACTIONS for _, f in terms(e)}):
        thermo = species[f if f in species else NAMES[f]]

        def d(t):
            _, h, s = janaf_dfg.stable(records[(f, "gas")], float(t))
            return h - thermo.h(t) / 1000, s - thermo.s(t) / 1000

        h0, s0 = d(298.15)
        rest = [round(d(t)[0] - h0 - t * (d(t)[1] - s0)) for t in TEMPERATURES]
        print(f"{f:4} H298 {h0 / 1000:+.3f} kJ, S298 {s0:+.3f} J/K, then {rest} J")


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("--out")
    parser.add_argument("--check")
    parser.add_argument("--compare", action="store_true")
    parser.add_argument("--differences", action="store_true")
    args = parser.parse_args()
    if args.compare:
        compare()
        return 0
    if args.differences:
        differences()
        return 0
    here = text()
    if args.out:
        Path(args.out).write_text(here, "utf-8", newline="\n")
    if args.check:
        there = Path(args.check).read_text("utf-8")
        for k, (a, b) in enumerate(zip(there.split("\n"), here.split("\n"))):
            if a != b:
                print(f"{args.check}, line {k + 1}: found “{a}”, made “{b}”", file=sys.stderr)
                return 1
        if there != here:
            print(f"{args.check}: another number of lines", file=sys.stderr)
            return 1
        print(f"{args.check}: as made")
    return 0


if __name__ == "__main__":
    sys.exit(main())
