"""Root-mean-square phasors of a supply, by frequency and by what carries them."""

import numpy as np


def phasor(rms, degrees):
    return rms * np.exp(1j * np.radians(degrees))


def lines(supply):
    if supply["kind"] == "ac1":
        return {"go": (supply["currentA"], supply.get("phaseDeg", 0))}
    balanced = [{"currentA": supply.get("currentA"), "angleDeg": angle} for angle in (0, -120, 120)]
    a, b, c = supply.get("phases", balanced)
    if supply.get("sequence", "abc") == "acb":
        b, c = c, b
    turn = supply.get("phaseDeg", 0)
    return {name: (one["currentA"], one["angleDeg"] + turn) for name, one in zip("abc", (a, b, c))}


def supplied(supply):
    """(frequency, is fundamental, phasor by carrier), without the way back."""
    if supply["kind"] == "dc":
        return [(0.0, True, {"go": complex(supply["currentA"])})]
    frequency = supply["frequencyHz"]
    carried = lines(supply)
    found = [(frequency, True, {name: phasor(rms, angle) for name, (rms, angle) in carried.items()})]
    for harmonic in supply.get("harmonics", []):
        order = harmonic["order"]
        share = harmonic["percent"] / 100
        add = harmonic.get("angleDeg", 0)
        found.append(
            (
                frequency * order,
                False,
                {name: phasor(share * rms, order * angle + add) for name, (rms, angle) in carried.items()},
            )
        )
    return found


def circuit_currents(circuit, carriers):
    """The same with the return or neutral: minus the sum, plus the stray current at the fundamental."""
    back = next((name for name in ("return", "n") if name in carriers), None)
    stray = phasor(circuit.get("strayCurrentA") or 0, circuit.get("strayAngleDeg", 0))
    found = []
    for frequency, fundamental, flowing in supplied(circuit["supply"]):
        if back:
            flowing = {**flowing, back: (stray if fundamental else 0) - sum(flowing.values())}
        found.append((frequency, flowing))
    return found
