"""Names of substances in plain English: a list for the known ones, built from the formula for the rest."""

import re

from form import counts

ELEMENT = dict(
    H="hydrogen", He="helium", Li="lithium", B="boron", C="carbon", N="nitrogen", O="oxygen", F="fluorine", Na="sodium",
    Mg="magnesium", Al="aluminium", Si="silicon", P="phosphorus", S="sulfur", Cl="chlorine", Ar="argon", K="potassium",
    Ca="calcium", Ti="titanium", V="vanadium", Cr="chromium", Mn="manganese", Fe="iron", Co="cobalt", Ni="nickel",
    Cu="copper", Zn="zinc", Sr="strontium", Zr="zirconium", Nb="niobium", Mo="molybdenum", Cd="cadmium", Sn="tin",
    Ba="barium", Ta="tantalum", W="tungsten", Pb="lead",
)
ANION = dict(
    H="hydride", B="boride", C="carbide", N="nitride", O="oxide", F="fluoride", Si="silicide", P="phosphide", S="sulfide",
    Cl="chloride", Al="aluminide",
)
TAILS = [
    ("SO4", "sulfate"), ("(SO4)3", "sulfate"), ("SO3", "sulfite"), ("CO3", "carbonate"), ("(CO3)2", "carbonate"), ("NO3", "nitrate"),
    ("(OH)2", "hydroxide"), ("(OH)3", "hydroxide"), ("OH", "hydroxide"), ("CN", "cyanide"), ("SiO3", "metasilicate"), ("SiO4", "orthosilicate"),
    ("Si2O5", "disilicate"), ("TiO3", "titanate"), ("TiO4", "orthotitanate"), ("Ti2O5", "dititanate"), ("AlO2", "aluminate"),
    ("BO2", "metaborate"), ("AlF6", "hexafluoroaluminate"), ("AlF4", "tetrafluoroaluminate"), ("WO4", "tungstate"), ("MoO4", "molybdate"), ("B4O7", "tetraborate"),
    ("(PO4)2", "phosphate"), ("Al2O4", "aluminate"), ("Cr2O4", "chromite"), ("Fe2O4", "ferrite"),
]
TIMES = {1: "", 2: "di", 3: "tri", 4: "tetra", 5: "penta", 6: "hexa", 7: "hepta", 8: "octa", 9: "nona", 10: "deca", 12: "dodeca", 15: "pentadeca", 23: "tricosa"}
KNOWN = {
    "H2O": "water", "NH3": "ammonia", "CH4": "methane", "CO": "carbon monoxide", "CO2": "carbon dioxide", "C": "carbon, graphite",
    "Fe0.947O": "wustite of fixed composition", "FeO": "wustite, per mole of iron", "Fe2O3": "iron(III) oxide, hematite",
    "Fe3O4": "iron(II,III) oxide, magnetite", "Cr2O3": "chromium(III) oxide, eskolaite", "Al2O3": "aluminium oxide, corundum",
    "SiO2": "silicon dioxide, quartz and cristobalite", "TiO2": "titanium dioxide, rutile", "CaO": "calcium oxide, lime",
    "CaCO3": "calcium carbonate, calcite", "MgO": "magnesium oxide, periclase", "MgCO3": "magnesium carbonate, magnesite",
    "CaMg(CO3)2": "dolomite", "Ca2SiO4": "calcium orthosilicate, larnite", "CaSiO3": "calcium metasilicate, wollastonite", "CaMgSi2O6": "diopside",
    "CaAl2Si2O8": "anorthite", "Ca2Al2SiO7": "gehlenite", "Ca2MgSi2O7": "akermanite", "CaMgSiO4": "monticellite", "Ca3MgSi2O8": "merwinite",
    "Ca3Si2O7": "rankinite", "CaTiSiO5": "titanite", "KAlSiO4": "kalsilite", "NaAlSi3O8": "albite", "FeTiO3": "iron titanate, ilmenite",
    "Fe2TiO4": "iron orthotitanate, ulvospinel", "MnTiO3": "manganese titanate", "MgFe2O4": "magnesium ferrite", "NiFe2O4": "nickel ferrite",
    "MgCr2O4": "magnesium chromite", "CoCr2O4": "cobalt chromite", "Zn2SiO4": "zinc orthosilicate, willemite", "MnSiO3": "manganese metasilicate, rhodonite",
    "NiO": "nickel(II) oxide, bunsenite", "CoO": "cobalt(II) oxide", "Co3O4": "cobalt(II,III) oxide",
    "Cu2O": "copper(I) oxide, cuprite", "CuO": "copper(II) oxide, tenorite", "MnO": "manganese(II) oxide, manganosite",
    "Mn3O4": "manganese(II,III) oxide, hausmannite", "Mn2O3": "manganese(III) oxide, bixbyite", "MnO2": "manganese dioxide, pyrolusite",
    "ZnO": "zinc oxide, zincite", "FeCr2O4": "iron chromite", "MnCr2O4": "manganese chromite", "MnS": "manganese sulfide, alabandite",
    "Fe3C": "iron carbide, cementite", "Fe4N": "iron nitride, gamma prime", "MgAl2O4": "magnesium aluminate, spinel",
    "Mg2SiO4": "magnesium orthosilicate, forsterite", "MgSiO3": "magnesium metasilicate, enstatite", "Al2SiO5": "aluminium silicate, andalusite family",
    "Al6Si2O13": "mullite", "ZrSiO4": "zircon", "Mn2SiO4": "manganese orthosilicate, tephroite", "Fe2SiO4": "iron orthosilicate, fayalite",
    "FeAl2O4": "iron aluminate, hercynite", "NH4Cl": "ammonium chloride", "H2": "hydrogen", "N2": "nitrogen", "O2": "oxygen", "Cl2": "chlorine",
    "F2": "fluorine", "O3": "ozone", "H2O2": "hydrogen peroxide", "N2H4": "hydrazine", "H2S": "hydrogen sulfide", "HS": "mercapto radical", "OH": "hydroxyl",
    "HO2": "hydroperoxyl", "NH": "imidogen", "NH2": "amidogen", "HNO2": "nitrous acid", "HNO3": "nitric acid", "HOCl": "hypochlorous acid",
    "H2SO4": "sulfuric acid", "PH3": "phosphine", "H3PO4": "phosphoric acid", "H3BO3": "orthoboric acid", "HBO2": "metaboric acid", "SiH4": "silane",
    "SiHCl3": "trichlorosilane", "SiH2Cl2": "dichlorosilane", "SiH3Cl": "chlorosilane", "COS": "carbonyl sulfide", "CN": "cyanogen radical", "C2N2": "cyanogen",
    "HCN": "hydrogen cyanide", "HNCO": "isocyanic acid", "COCl2": "phosgene", "COCl": "chloroformyl", "CHCl3": "chloroform", "CH2Cl2": "dichloromethane",
    "CH3Cl": "chloromethane", "CHF3": "trifluoromethane", "CH3F": "fluoromethane", "C2F4": "tetrafluoroethene", "C2Cl4": "tetrachloroethene",
    "COF2": "carbonyl fluoride", "CH3": "methyl", "CH2": "methylene", "C2H2": "ethyne, acetylene", "C2H4": "ethene", "C2H6": "ethane", "C2H5": "ethyl",
    "C2H": "ethynyl", "CH3OH": "methanol", "HCHO": "methanal, formaldehyde", "HCO": "formyl", "HCOOH": "methanoic acid", "C2H5OH": "ethanol",
    "CH3CHO": "ethanal", "BH3": "borane", "B2H6": "diborane", "HBO": "oxoborane", "POCl3": "phosphoryl chloride", "TiOCl2": "titanyl chloride",
    "NbOCl3": "niobium oxychloride", "WOCl4": "tungsten oxytetrachloride", "WO2Cl2": "tungsten dioxydichloride", "SOF2": "thionyl fluoride",
    "SO2F2": "sulfuryl fluoride", "SO2Cl2": "sulfuryl chloride", "NOCl": "nitrosyl chloride", "BOF": "boron oxyfluoride", "Fe(CO)5": "iron pentacarbonyl",
    "Na3AlF6": "sodium hexafluoroaluminate, cryolite", "Si2N2O": "silicon oxynitride", "FeS": "iron sulfide, troilite and pyrrhotite",
    "FeS2": "iron disulfide, pyrite", "NiS": "nickel sulfide, millerite", "CuO.CuSO4": "basic copper sulfate", "BaCO3": "barium carbonate, witherite",
    "CaTiO3": "calcium titanate, perovskite", "ZnS": "zinc sulfide, sphalerite", "NH4F": "ammonium fluoride", "MoO2(OH)2": "molybdic acid vapour",
    "WO2(OH)2": "tungstic acid vapour", "Ni(CO)4": "nickel tetracarbonyl", "C2Ca": "calcium carbide",
}


def name(formula):
    if formula in KNOWN:
        return KNOWN[formula]
    n = counts(formula)
    if len(n) == 1:
        (symbol, k), = n.items()
        return ELEMENT[symbol] if k == 1 else f"{ELEMENT[symbol]}, {TIMES.get(int(k), str(int(k)))}atomic"
    for tail, word in sorted(TAILS, key=lambda x: -len(x[0])):
        if formula.endswith(tail):
            head = re.sub(r"[0-9()]", "", formula[: -len(tail)])
            symbols = re.findall(r"[A-Z][a-z]?", head)
            if len(symbols) == 1 and symbols[0] in ELEMENT and (symbols[0] not in ANION or symbols[0] in ("Al",)):
                return f"{ELEMENT[symbols[0]]} {word}"
    if len(n) == 2:
        (a, p), (b, q) = n.items()
        if b in ANION:
            if p != int(p) or q != int(q):
                return f"{ELEMENT[a]} {ANION[b]}, {formula}"
            first, second = TIMES[int(p)] + ELEMENT[a], TIMES[int(q)] + ANION[b]
            return f"{first} {second}".replace("aoxide", "oxide").replace("ooxide", "oxide")
    return " ".join(ELEMENT[s] for s in n) + " compound"
