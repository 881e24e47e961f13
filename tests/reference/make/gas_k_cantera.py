"""Makes ../gas_k_cantera.csv: equilibrium constants of gas reactions from the species data that Cantera ships.

    python gas_k_cantera.py --out FILE     write the table
    python gas_k_cantera.py --check FILE   make it in memory and name the first line that differs
    python gas_k_cantera.py --compare      show the difference to our own data file

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
SAME = "same data to the fit"
# Equation; largest relative difference of K to accept; difference of the enthalpies at 298.15 K between our newer data and
# these, kJ per equation as written; why.
REACTIONS = (
    ("CO + H2O = CO2 + H2", 0.005, 0.0, SAME),
    ("2 CO + O2 = 2 CO2", 0.005, 0.0, SAME),
    ("2 H2 + O2 = 2 H2O", 0.005, 0.0, SAME),
    ("CH4 + H2O = CO + 3 H2", 0.017, 0.0, "newer heat capacity of CH4"),
    ("CH4 + CO2 = 2 CO + 2 H2", 0.017, 0.0, "newer heat capacity of CH4"),
    ("N2 + 3 H2 = 2 NH3", 0.013, 0.0, "newer heat capacity of NH3"),
    ("2 SO2 + O2 = 2 SO3", 0.030, 0.0, "SO3 by 0.15 kJ and 0.23 J/K lower"),
    ("2 H2S = 2 H2 + S2", 0.050, 0.392, "S2 by 0.20 kJ higher and 0.15 J/K lower; H2S by 0.10 kJ lower"),
    ("4 HCl + O2 = 2 Cl2 + 2 H2O", 0.005, 0.0, SAME),
    ("N2 + O2 = 2 NO", 0.005, 0.0, SAME),
    ("COS + H2O = CO2 + H2S", 0.025, 3.203, "COS by 3.30 kJ and H2S by 0.10 kJ lower"),
    ("CO + NH3 = HCN + H2O", 0.005, -1.912, "HCN by 1.92 kJ lower"),
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
    for equation, within, shift, why in REACTIONS:
        for t in TEMPERATURES:
            log_k = -sum(n * g(f, t) for n, f in terms(equation)) / math.log(10)
            made.append((equation, t, log_k, within, shift, why))
    return made


HEAD = f"""\
# Equilibrium constants of gas reactions from Cantera's own species data, ideal gases, standard pressure 1 bar.
# Source: {FILE} of Cantera {ct.__version__} (BSD-3), polynomials of McBride, B. J.; Gordon, S.; Reno, M. A. (1993), NASA TM-4513.
# Made by make/gas_k_cantera.py. log10_k as the equation is written. within: the largest relative difference of K to accept,
# 0.5 % where the data are the same, else what newer heat capacities and entropies make of it. shift_kj: the difference of the
# enthalpies of reaction at 298.15 K between newer data and these; compare with log10_k - 1000 shift_kj / (R T ln 10). why: where
# the difference comes from.
equation,t_k,log10_k,within,shift_kj,why
"""


def text():
    return HEAD + "".join(f"{e},{t},{k:.5f},{w:g},{d:g},{why}\n" for e, t, k, w, d, why in make())


def compare():
    records = {(r["formula"], r["class"]): r for r in janaf_dfg.read_data(janaf_dfg.DATA) if r["preferred"]}
    worst = {}
    for equation, t, log_k, within, shift, why in make():
        g = 0.0
        for n, f in terms(equation):
            _, h, s = janaf_dfg.stable(records[(f, "gas")], float(t))
            g += n * (h - t * s)
        ours = -g / (8.31446261815324 * t * math.log(10))
        off = 10 ** (ours - log_k + 1000 * shift / (8.31446261815324 * t * math.log(10))) - 1
        worst.setdefault(equation, []).append(f"{100 * off:+.2f} %" + ("" if abs(off) <= within else " OUTSIDE"))
    for equation, offs in worst.items():
        print(f"{equation:28}", " ".join(f"{o:>10}" for o in offs))


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("--out")
    parser.add_argument("--check")
    parser.add_argument("--compare", action="store_true")
    args = parser.parse_args()
    if args.compare:
        compare()
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
