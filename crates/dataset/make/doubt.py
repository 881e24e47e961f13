"""Standard uncertainties of H298 (kJ/mol) and S298 (J/(mol K)) and the reason for each, in plain words.

In this order: a listed value for a substance; CODATA for key values; the spread of independent sources; a floor by class.
"""

import janaf_fit
from form import atoms, counts

# CODATA Key Values for Thermodynamics (Cox, Wagman, Medvedev 1989): stated uncertainties of H298 and S298.
CODATA_GAS = {
    "O": (0.1, 0.003), "O2": (0, 0.005), "H": (0.006, 0.003), "H2": (0, 0.003), "H2O": (0.04, 0.01), "F": (0.3, 0.004),
    "F2": (0, 0.005), "HF": (0.7, 0.003), "Cl": (0.008, 0.004), "Cl2": (0, 0.01), "HCl": (0.1, 0.005), "S": (0.15, 0.006),
    "S2": (0.3, 0.05), "SO2": (0.2, 0.05), "H2S": (0.5, 0.05), "N": (0.4, 0.003), "N2": (0, 0.004), "NH3": (0.35, 0.05),
    "P": (1.0, 0.003), "P2": (2.0, 0.02), "P4": (0.3, 0.1), "C": (0.45, 0.003), "CO": (0.17, 0.004), "CO2": (0.13, 0.01),
    "Si": (8.0, 0.004), "SiF4": (0.8, 0.5), "BF3": (0.8, 0.2), "B": (5.0, 0.02), "Sn": (1.5, 0.004), "Pb": (0.8, 0.005),
    "Al": (4.0, 0.004), "Zn": (0.4, 0.004), "Cd": (0.2, 0.004), "Cu": (1.2, 0.004), "Ti": (3.0, 0.01), "TiCl4": (3.0, 0.4),
    "Mg": (0.8, 0.003), "Ca": (0.8, 0.004), "Li": (1.0, 0.003), "Na": (0.7, 0.003), "K": (0.8, 0.003), "Ar": (0, 0.003),
    "He": (0, 0.002),
}
CODATA_SOLID = {
    "H2O": (0.04, 0.03), "SiO2": (1.0, 0.2), "B2O3": (1.4, 0.3), "H3BO3": (0.8, 0.6), "SnO": (0.2, 0.3), "SnO2": (0.2, 0.1),
    "PbSO4": (0.4, 0.6), "Al2O3": (1.3, 0.1), "AlF3": (1.3, 0.5), "ZnO": (0.27, 0.4), "CdO": (0.4, 1.2), "CuSO4": (1.2, 0.4),
    "TiO2": (0.8, 0.3), "MgO": (0.3, 0.15), "MgF2": (1.2, 0.5), "CaO": (0.45, 0.4),
}
ELEMENT_S = {
    "C": 0.1, "S": 0.05, "P": 0.25, "Si": 0.08, "B": 0.08, "Al": 0.1, "Zn": 0.15, "Cd": 0.15, "Cu": 0.08, "Ti": 0.1, "Mg": 0.1,
    "Ca": 0.4, "Li": 0.15, "Na": 0.2, "K": 0.2, "Pb": 0.3, "Sn": 0.08, "Fe": 0.1, "Ni": 0.1, "Cr": 0.2, "Mn": 0.2, "Co": 0.2,
}
REFERENCE_GASES = {"H2", "O2", "N2", "F2", "Cl2", "Ar", "He"}

# (formula, gas) to (u H298, u S298, reason)
LISTED = {
    ("CH4", True): (0.4, 0.05, "combustion calorimetry, several laboratories"),
    ("C2H2", True): (0.8, 0.1, "combustion calorimetry"),
    ("C2H4", True): (0.4, 0.1, "combustion calorimetry"),
    ("C2H6", True): (0.4, 0.1, "combustion calorimetry"),
    ("CH3OH", True): (0.4, 0.2, "combustion calorimetry"),
    ("HCHO", True): (0.5, 0.1, "combustion calorimetry"),
    ("HCN", True): (2, 0.1, "sources differ by 4 kJ"),
    ("COS", True): (1.5, 0.1, "sources differ by 3.3 kJ"),
    ("OH", True): (0.3, 0.02, "spectroscopic, older tables differ by 1.7 kJ"),
    ("SO3", True): (0.7, 0.1, "measured equilibrium with SO2 and calorimetry"),
    ("NO", True): (0.2, 0.02, "spectroscopic and calorimetric"),
    ("NO2", True): (0.4, 0.05, "measured equilibrium with NO"),
    ("N2O", True): (0.4, 0.05, "calorimetry"),
    ("CS2", True): (0.8, 0.1, "combustion calorimetry"),
    ("H2SO4", True): (4, 1, "vapour pressures, sources differ by several kJ"),
    ("SiO", True): (5, 0.5, "vapour pressures, sources differ by several kJ"),
    ("PH3", True): (2, 0.5, "sources differ in the phosphorus they refer to"),
    ("MoO3", True): (12, 2, "sources differ by 11 kJ"),
    ("WO3", True): (20, 3, "sources differ by 23 kJ"),
    ("CrO2", True): (20, 4, "sources differ by 29 kJ"),
    ("CrO3", True): (20, 4, "sources differ by 33 kJ"),
    ("FeCl3", True): (5, 2, "record corrected by hand for a unit slip in its source"),
    ("Cr2O3", False): (4, 1.2, "sources differ by 6 kJ; about 2 K of dew point"),
    ("CaCO3", False): (0.8, 0.3, "measured decomposition pressures scatter by about 10 K at 1 atm"),
    ("MgCO3", False): (2, 0.5, "three good sources within 3 kJ; the 1996 value 15 kJ off is set aside"),
    ("Si3N4", False): (30, 5, "calorimetry and tables differ by 80 kJ"),
    ("SiS2", False): (35, 5, "sources differ by 73 kJ"),
    ("Al4C3", False): (8, 3, "sources differ by 9 kJ"),
    ("KBO2", False): (8, 3, "sources differ by 12 kJ"),
    ("MgSO4", False): (10, 2, "one table is 25 kJ off the others"),
    ("Cu2S", False): (5, 3, "sources differ by 9 kJ at 1000 K"),
    ("SrCO3", False): (4, 2, "sources differ by 6 kJ at 1000 K"),
    ("Fe3O4", False): (1.5, 1.5, "sources differ by 3 kJ in the hematite-magnetite equilibrium"),
    ("Fe2O3", False): (1.0, 1.0, "sources differ by 3 kJ in the hematite-magnetite equilibrium"),
    ("Fe0.947O", False): (0.8, 0.8, "sources agree within 1 kJ; the true composition varies"),
    ("FeO", False): (0.6, 0.4, "galvanic cells and gas equilibria within 1 kJ"),
    ("WC", False): (3, 2, "combustion calorimetry, one compilation"),
    ("V2O5", False): (5, 3, "sources differ by up to 11 kJ when hot"),
    ("V2O3", False): (5, 3, "sources differ by 3 to 12 kJ"),
    ("VO2", False): (4, 2, "sources differ by up to 7 kJ when hot"),
    ("VO", False): (6, 3, "sources differ by 3 to 10 kJ"),
    ("MoO2", False): (2, 2, "sources differ by 3 kJ"),
    ("WO2", False): (2, 2, "sources differ by 2 kJ"),
    ("WO3", False): (3, 2, "sources differ by up to 9 kJ when hot"),
    ("Nb2O5", False): (4, 3, "sources differ by 3 kJ; measured ratios spread by a factor of 3"),
    ("NbO", False): (8, 3, "sources differ by 14 kJ"),
    ("NbO2", False): (4, 3, "sources differ by several kJ"),
    ("Cr2N", False): (8, 4, "one compilation; measured nitrogen pressures spread by a factor of 2"),
    ("CH3CHO", True): (0.5, 0.3, "combustion calorimetry"),
    ("HCOOH", True): (0.6, 0.3, "combustion calorimetry"),
    ("C2H5OH", True): (0.5, 0.3, "combustion calorimetry"),
    ("CH3", True): (0.4, 0.2, "spectroscopic"),
    ("C2H", True): (2, 1, "spectroscopic; an older table is 89 kJ off"),
    ("NH", True): (2, 0.1, "spectroscopic; an older table is 20 kJ off"),
    ("TiN", False): (2, 0.5, "combustion calorimetry; sources within 2 kJ"),
    ("TiC", False): (2, 0.5, "combustion calorimetry; sources within 2 kJ"),
    ("TaC", False): (2.5, 1, "combustion calorimetry"),
    ("ZrC", False): (3, 1, "combustion calorimetry; varies with composition"),
    ("SiC", False): (3, 0.5, "sources differ by several kJ"),
    ("AlN", False): (1.5, 0.5, "sources agree within 1.5 kJ"),
    ("NH4Cl", False): (0.5, 0.5, "calorimetry, well known"),
    ("H2SO4", False): (0.7, 0.5, "calorimetry, well known"),
    ("FeCl2", False): (1.5, 1, "calorimetry"),
    ("NiCl2", False): (2, 1, "calorimetry"),
    ("CoCl2", False): (2.5, 1, "calorimetry"),
    ("Mg2SiO4", False): (2, 0.5, "sources within 4 kJ"),
    ("MgSiO3", False): (2.5, 0.5, "sources within 5 kJ"),
    ("MgAl2O4", False): (2, 1, "sources within 2 kJ; disorder when hot"),
    ("Al2SiO5", False): (2, 0.5, "sources within 3 kJ"),
    ("FeS2", False): (2, 1, "sources within several kJ"),
    ("FeS", False): (1.5, 1, "sources differ by 2 kJ"),
    ("Cr3C2", False): (6, 2, "old calorimetry; measured carbon activities differ by several kJ"),
    ("Cr7C3", False): (10, 4, "old calorimetry; measured carbon activities differ by several kJ"),
    ("Cr23C6", False): (18, 8, "old calorimetry; the set's own columns differ by 7 to 13 kJ"),
    ("CuCl", False): (2, 1, "the later figure in another compilation is a slip and set aside"),
    ("CuCl2", False): (5, 2, "sources differ by 12 kJ"),
    ("CuF", False): (15, 4, "estimate"),
    ("Cu(OH)2", False): (5, 5, "sources differ by 14 kJ and more"),
    ("K2O2", False): (15, 5, "sources differ by 52 kJ"),
    ("CoO", False): (1.0, 0.5, "sources within 1 kJ"),
    ("Co3O4", False): (5, 3, "sources differ by 9 kJ"),
    ("MoS2", False): (4, 2, "sources differ by 4 kJ"),
    ("CoSO4", False): (6, 3, "sources differ by 11 kJ when hot"),
    ("HCHO", True): (0.6, 0.1, "combustion calorimetry; an older table is 7 kJ off"),
    ("TiCl4", False): (3, 1, "calorimetry; the entropy in an older table is wrong"),
    ("W", False): (0, 0.15, "element in its reference state"),
    ("CrN", False): (6, 3, "one compilation; measured nitrogen pressures spread by a factor of 2"),
}


def up(x):
    """Rounded up to one or two digits."""
    for step in (0.1, 0.5, 1.0):
        limit = {0.1: 2, 0.5: 10, 1.0: 1e9}[step]
        if x <= limit:
            return -(-int(x * 1000 + 0.5) // int(step * 1000)) * step
    return x


def of(formula, gas, h298, s298, code):
    """(u of H298, u of S298, reason) for a record; `code` is the reference code of the NASA file, "" otherwise."""
    n = counts(formula)
    if (formula, gas) in LISTED:
        return LISTED[(formula, gas)]
    if gas and formula in REFERENCE_GASES:
        return 0, CODATA_GAS[formula][1], "element in its reference state; CODATA entropy"
    if not gas and len(n) == 1 and abs(float(h298)) < 1e-6:
        return 0, ELEMENT_S.get(formula, 0.4), "element in its reference state"
    table = CODATA_GAS if gas else CODATA_SOLID
    if formula in table:
        return (*table[formula], "CODATA key value")
    other = janaf_fit.spread(formula, gas, float(h298))
    size = sum(n.values())
    floor = 2.0 if size <= 4 else 3.0
    if other and not code.startswith("j"):
        dh, ds = abs(float(h298) - other[0]), abs(float(s298) - other[1])
        uh, us = max(floor if dh > 0.5 else 1.0, up(dh / 2)), max(0.5, up(ds / 2))
        near = "agree within 0.5" if dh <= 0.5 else f"differ by {dh:.1f}"
        return min(uh, 60), min(us, 15), f"independent sources {near} kJ in H298"
    if gas:
        return (5.0 if size <= 3 else 8.0), 1.5, "one evaluated source"
    return 5.0 if size > 2 else 4.0, 1.5, "one evaluated source"
