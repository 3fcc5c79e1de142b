"""Conductors of a circuit as lines in space: frames by rotation vectors, joints by cutting lines with planes."""

import numpy as np
from scipy.spatial.transform import Rotation

VERTICAL = np.cos(np.radians(1))
BEVEL = np.cos(np.radians(120))


def unit(vector):
    return vector / np.linalg.norm(vector)


def merged(path):
    """The path without its collinear vertices."""
    points = [np.array(point, float) for point in path]
    kept = [points[0]]
    for before, point, after in zip(points, points[1:], points[2:]):
        if np.linalg.norm(np.cross(unit(point - before), unit(after - point))) > 1e-9:
            kept.append(point)
    return kept + [points[-1]]


def frames(points):
    """Tangent, u and v of every leg: u level and to the right (+x on a vertical first leg), then carried along without twist."""
    tangents = [unit(to - start) for start, to in zip(points, points[1:])]
    first = tangents[0]
    if abs(first[2]) >= VERTICAL:
        u = unit(np.array([1.0, 0, 0]) - first[0] * first)
    else:
        u = unit(np.cross(first, [0, 0, 1]))
    found = [(first, u, np.cross(u, first))]
    for before, tangent in zip(tangents, tangents[1:]):
        axis = np.cross(before, tangent)
        angle = np.arctan2(np.linalg.norm(axis), before @ tangent)
        turn = Rotation.from_rotvec(unit(axis) * angle)
        found.append((tangent, turn.apply(found[-1][1]), turn.apply(found[-1][2])))
    return found


def conductor(path, p, q):
    """The line at offset (p, q), mitred, bevelled above 120°, joined straight to both ends of the path."""
    points = merged(path)
    legs = frames(points)
    across = [p * u + q * v for _, u, v in legs]
    line = [points[0], points[0] + across[0]]
    for index in range(1, len(legs)):
        before, after, vertex = legs[index - 1][0], legs[index][0], points[index]
        if before @ after < BEVEL:
            line += [vertex + across[index - 1], vertex + across[index]]
            continue
        normal = before + after
        on = vertex + across[index - 1]
        line.append(on + before * (normal @ (vertex - on)) / (normal @ before))
    return line + [points[-1] + across[-1], points[-1]]


def base_places(arrangement):
    d = arrangement.get("spacingM", 0)
    low, top = -d / (2 * np.sqrt(3)), d / np.sqrt(3)
    return {
        "single": [("go", 0, 0)],
        "pair": [("go", -d / 2, 0), ("return", d / 2, 0)],
        "flat": [("a", -d, 0), ("b", 0, 0), ("c", d, 0)],
        "trefoil": [("a", -d / 2, low), ("b", d / 2, low), ("c", 0, top)],
        "quad": [("a", -d / 2, d / 2), ("b", d / 2, d / 2), ("c", d / 2, -d / 2), ("n", -d / 2, -d / 2)],
        "flat-n": [("a", -1.5 * d, 0), ("b", -d / 2, 0), ("c", d / 2, 0), ("n", 1.5 * d, 0)],
    }[arrangement["kind"]]


def places(arrangement):
    """Carrier, p, q and share of the current of every conductor, turned by the roll."""
    if arrangement["kind"] == "custom":
        found = [(c["of"], *c["offsetM"], c["fraction"]) for c in arrangement["conductors"]]
    else:
        parallel = arrangement.get("parallel", {"sets": 1, "pitchM": 0})
        count = parallel["sets"]
        found = []
        for index in range(count):
            order = dict(zip("abc", parallel.get("phaseOrders", ["abc"] * count)[index]))
            shift = (index - (count - 1) / 2) * parallel["pitchM"]
            for carrier, p, q in base_places(arrangement):
                found.append((order.get(carrier, carrier), p + shift, q, 1 / count))
    roll = np.exp(1j * np.radians(arrangement.get("rollDeg", 0)))
    turned = [(carrier, complex(p, q) * roll, share) for carrier, p, q, share in found]
    return [(carrier, place.real, place.imag, share) for carrier, place, share in turned]
