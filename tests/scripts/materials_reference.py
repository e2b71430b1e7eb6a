"""Reference densities for the tests of the materials, from general-purpose packages.

    python -m venv venv && venv/bin/pip install ht==1.2.0 periodictable==2.1.0
    venv/bin/python tests/scripts/materials_reference.py

The tests hold a copy of what this prints, with the publication beside each number.
"""

from importlib.metadata import version

import periodictable
from ht.insulation import building_materials

print("ht", version("ht"), "- DIN EN 12524 (2000-07), kg/m3")
for name in (
    "Plastics, polystyrene",
    "Plastics, polymethylmethacrylate (PMMA)",
    "Plastics, polyethylene / polythene, high density",
    "Plastics, polyethylene / polythene, low density",
    "Plastics, polypropylene",
    "Plastics, polyamide (nylon)",
    "Plastics, polycarbonates",
    "Plastics, polytetrafluoroethylene (PTFE)",
    "Plastics, epoxy resin",
    "Glass, quartz",
    "Glass, soda lime",
    "Metals, steel",
    "Metals, stainless steel",
    "Metals, copper",
):
    print(f"{name:50}", building_materials[name][0])

print("periodictable", version("periodictable"), "- CRC Handbook, 80th edition, g/cm3")
for symbol in ("Cu", "Ni", "Ag", "Au", "W", "Si", "Al", "Ti"):
    print(symbol, periodictable.elements.symbol(symbol).density)
