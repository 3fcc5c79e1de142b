"""What each kind of limit compares, and the parts of it, in the slow and obvious way."""

import itertools

import numpy as np


def load_cases(plan):
    cases = [(case["id"], case["factors"]) for case in plan.get("loadCases", [])]
    return cases or [(None, {})]


def loaded(components, factors):
    return [(who, source, hertz, factors.get(who, 1) * field) for who, source, hertz, field in components]


def steady(components, part=slice(0, 3)):
    return sum((field[part].real for _, _, hertz, field in components if hertz == 0), np.zeros(12)[part])


def value_of(plan, sensor, limit, components):
    """The governing value over the load cases (the first on a tie), its load case, and parts where they are defined."""
    if limit["kind"] == "swing":
        return {"value": swing(plan, sensor, components), "loadCaseId": None}
    best = None
    for name, factors in load_cases(plan):
        value, parts = MEASURES[limit["kind"]](plan, sensor, limit, loaded(components, factors))
        if best is None or value > best["value"]:
            best = {"value": float(value), "loadCaseId": name, **({"parts": parts} if parts else {})}
    return best


def compared(sensor, field):
    """Magnitude of a steady field, or of its component along the axis."""
    if not sensor.get("axis"):
        return np.linalg.norm(field)
    return abs(field @ np.array(sensor["axis"])) / np.linalg.norm(sensor["axis"])


def swing(plan, sensor, components):
    states = [np.zeros(3)] + [steady(loaded(components, factors)) for _, factors in load_cases(plan)]
    return float(max(compared(sensor, one - other) for one, other in itertools.combinations(states, 2)))


def projected(sensor, field):
    if not sensor.get("axis"):
        return field
    axis = np.array(sensor["axis"]) / np.linalg.norm(sensor["axis"])
    return (field @ axis) * axis


def static(plan, sensor, limit, components):
    background = (sensor.get("background") or {}).get("staticT")
    vector = np.array(background) if isinstance(background, list) else np.zeros(3)
    bound = background if isinstance(background, float) else 0
    whole = projected(sensor, steady(components) + vector)
    size = np.linalg.norm(whole)
    value = size + bound
    parts = {}
    for who, _, hertz, field in components:
        if hertz == 0:
            parts[who] = parts.get(who, 0) + float(projected(sensor, field[:3].real) @ whole / size / value)
    if background is not None:
        parts["background"] = float((projected(sensor, vector) @ whole / size + bound) / value)
    return value, parts


def grouped(sensor, components, band):
    """Field phasors by frequency, then by source; frequencies within 0.5 % are one."""
    low, high = band
    found = {}
    for who, source, hertz, field in sorted(components, key=lambda part: part[2]):
        if hertz == 0 or not low <= hertz <= high:
            continue
        name = next((known for known in found if known <= hertz <= 1.005 * known), hertz)
        found.setdefault(name, {}).setdefault(source, []).append((who, field[:3]))
    return found


def major(field):
    """Half the longest diameter of the ellipse that a phasor traces (rms): the larger singular value of (re, im)."""
    return np.linalg.svd(np.array([field.real, field.imag]), compute_uv=False)[0]


def alternating(plan, sensor, limit, components):
    peak = limit.get("measure") == "peakToPeak"
    size = major if peak and not sensor.get("axis") else np.linalg.norm
    typical = plan.get("unknownPhase") == "typical"
    measured = {}
    for line in (sensor.get("background") or {}).get("alternating", []):
        if limit["bandHz"][0] <= line["frequencyHz"] <= limit["bandHz"][1]:
            measured[line["frequencyHz"]] = line["rmsT"]
    values, shares = [], []
    classes = grouped(sensor, components, limit["bandHz"])
    for hertz in sorted({*classes, *measured}):
        sources = classes.get(hertz, {})
        fields = {s: projected(sensor, sum(field for _, field in members)) for s, members in sources.items()}
        sizes = {source: size(field) for source, field in fields.items()}
        drawn = np.sqrt(sum(s**2 for s in sizes.values())) if typical else sum(sizes.values())
        bound = measured.get(hertz, 0)
        value = drawn + bound
        within = {"background": bound / value} if sensor.get("background") else {}
        for source, members in sources.items():
            weight = sizes[source] * (sizes[source] / drawn if typical else 1) / value
            square = np.vdot(fields[source], fields[source]).real
            for who, field in members:
                part = np.vdot(fields[source], projected(sensor, field)).real / square
                within[who] = within.get(who, 0) + weight * part
        values.append(value)
        shares.append(within)
    squares = sum(value**2 for value in values)
    parts = {}
    for value, within in zip(values, shares):
        for who, part in within.items():
            parts[who] = parts.get(who, 0) + float(part * value**2 / squares)
    whole = 2 * np.sqrt(2) * sum(values) if peak else np.sqrt(squares)
    return whole, parts


def north(plan):
    """Magnetic north in the plan and the stated field's components: true north turned clockwise by the declination."""
    earth = plan["earthField"]
    bearing = np.radians(plan["frame"]["northBearingDeg"])
    turn = -np.radians(earth["declinationDeg"])
    true_north = -np.sin(bearing) + 1j * np.cos(bearing)
    magnetic = true_north * np.exp(1j * turn)
    return magnetic, earth["horizontalT"], earth["verticalT"]


def heading(plan, sensor, limit, components):
    magnetic, horizontal, _ = north(plan)
    x, y, _ = steady(components)
    # Clockwise from magnetic north, so the other way round than the angle of a complex number.
    return abs(np.degrees(np.angle((magnetic * horizontal + complex(x, y)) / magnetic))), None


def gradient(plan, sensor, limit, components):
    return np.linalg.norm(steady(components, slice(3, 12))), None


def full_range(plan, sensor, limit, components):
    magnetic, horizontal, down = north(plan)
    earth = np.array([horizontal * magnetic.real, horizontal * magnetic.imag, -down])
    value = np.linalg.norm(earth + steady(components))
    for sources in grouped(sensor, components, (0, np.inf)).values():
        value += np.sqrt(2) * sum(major(sum(field for _, field in members)) for members in sources.values())
    return value, None


MEASURES = {
    "static": static,
    "alternating": alternating,
    "heading": heading,
    "gradient": gradient,
    "range": full_range,
}
