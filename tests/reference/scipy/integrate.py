"""
Screens the plans beside it by numerical integration and writes what each limit compares as JSON on standard output:

    /usr/bin/python3 tests/reference/scipy/integrate.py > tests/reference/scipy/figures.json

It shares nothing with the engine but the plan document and the definitions of docs/method.md. Tolerances are left out:
the plans here state none. Needs Debian's python3-scipy.
"""

import json
import re
import sys
from pathlib import Path

import numpy as np
import scipy

# Nothing is left beside the sources.
sys.dont_write_bytecode = True

from currents import circuit_currents, supplied
from fields import of_helix, of_line, of_turn
from geometry import conductor, places
from measures import value_of


def circuit_components(circuit, at):
    """(id, source, frequency, phasors of field and gradient) of a circuit at load factor 1."""
    arrangement = circuit["arrangement"]
    per_ampere = {}
    if arrangement["kind"] == "twisted-pair":
        half, roll = arrangement["spacingM"] / 2, np.radians(arrangement.get("rollDeg", 0))
        for carrier, side in (("go", -half), ("return", half)):
            p, q = side * np.cos(roll), side * np.sin(roll)
            per_ampere[carrier] = of_helix(circuit["path"], p, q, arrangement["layM"], at)
    else:
        for carrier, p, q, share in places(arrangement):
            part = share * of_line(conductor(circuit["path"], p, q), at)
            per_ampere[carrier] = per_ampere.get(carrier, 0) + part
    shielding = circuit.get("shieldingFactor", 1)
    source = circuit.get("source") or circuit["id"]
    return [
        (circuit["id"], source, frequency, shielding * total(flowing, per_ampere))
        for frequency, flowing in circuit_currents(circuit, per_ampere.keys())
    ]


def total(flowing, per_ampere):
    return sum(current * per_ampere[carrier] for carrier, current in flowing.items())


def equipment_components(item, at):
    centre = np.array(item["centre"], float)
    if item["kind"] == "coil":
        axis = np.array(item["axis"], float) / np.linalg.norm(item["axis"])
        turns, length = item["turns"], item["lengthM"]
        heights = -length / 2 + (np.arange(turns) + 0.5) * length / turns
        field = sum(of_turn(centre + height * axis, axis, item["radiusM"], at) for height in heights)
    else:
        field = of_turn(centre, item["axis"], item["meanRadiusM"], at)
    shielding = item.get("shieldingFactor", 1)
    return [
        (item["id"], item.get("source") or item["id"], frequency, shielding * flowing["go"] * field)
        for frequency, _, flowing in supplied(item["supply"])
    ]


def screened(plan):
    findings = {}
    for sensor in plan["sensors"]:
        at = np.array(sensor["position"], float)
        components = [part for circuit in plan["circuits"] for part in circuit_components(circuit, at)]
        for item in plan.get("equipment", []):
            components += equipment_components(item, at)
        findings[sensor["id"]] = {
            limit.get("id", str(index + 1)): value_of(plan, sensor, limit, components)
            for index, limit in enumerate(sensor["limits"])
        }
    return findings


def main():
    folder = Path(__file__).parent / "plans"
    plans = {file.stem: screened(json.loads(file.read_text())) for file in sorted(folder.glob("*.json"))}
    versions = {"python": sys.version.split()[0], "numpy": np.__version__, "scipy": scipy.__version__}
    made = "/usr/bin/python3 tests/reference/scipy/integrate.py > tests/reference/scipy/figures.json"
    text = json.dumps({"madeBy": made, "versions": versions, "plans": plans}, indent=2)
    # Exponents as the project's formatter writes them: e-6, not e-06.
    sys.stdout.write(re.sub(r"(\de[-+])0+", r"\1", text) + "\n")


if __name__ == "__main__":
    main()
