"""Section properties from exact pieces: rectangles, circles and root fillets.

Axes of a drawn section: z to the right, y up.  Every shape is a list of pieces
(area, z, y, i_zz, i_yy): signed area, centroid, second moments about the piece's own
centroid (i_zz bends about the horizontal axis, i_yy about the vertical one).
"""
from math import pi


def rect(b, h, z, y, sign=1.0):
    return (sign * b * h, z, y, sign * b * h**3 / 12, sign * h * b**3 / 12)


def disc(d, sign=1.0):
    return (sign * pi * d**2 / 4, 0.0, 0.0, sign * pi * d**4 / 64, sign * pi * d**4 / 64)


def spandrel(r, z, y, right, up, sign=1.0):
    """What fills a square corner: a square of side r less a quarter disc.

    (z, y) is the sharp corner; the material runs from it to the right or left, up or down.
    From the corner: square centroid r/2; quarter disc centre at r, its centroid 4r/3pi back.
    """
    square, quarter = r * r, pi * r * r / 4
    arm = r - 4 * r / (3 * pi)
    area = square - quarter
    c = (square * r / 2 - quarter * arm) / area
    quarter_own = pi * r**4 / 16 - quarter * (4 * r / (3 * pi)) ** 2
    own = r**4 / 12 + square * (r / 2 - c) ** 2 - quarter_own - quarter * (arm - c) ** 2
    return (sign * area, z + (c if right else -c), y + (c if up else -c), sign * own, sign * own)


def rounded(b, h, r, sign=1.0):
    out = [rect(b, h, 0, 0, sign)]
    if r > 0:
        for right in (True, False):
            for up in (True, False):
                out.append(spandrel(r, -b / 2 if right else b / 2, -h / 2 if up else h / 2, right, up, -sign))
    return out


def pieces(shape, p):
    """Pieces of the shape and its extent (z_min, z_max, y_min, y_max)."""
    g = lambda k: p.get(k, 0.0)
    if shape == "rectangle":
        b, h = g("width"), g("depth")
        return [rect(b, h, 0, 0)], (-b / 2, b / 2, -h / 2, h / 2)
    if shape == "round":
        d = g("diameter")
        return [disc(d)], (-d / 2, d / 2, -d / 2, d / 2)
    if shape == "tube":
        d, t = g("diameter"), g("wall")
        return [disc(d), disc(d - 2 * t, -1.0)], (-d / 2, d / 2, -d / 2, d / 2)
    if shape == "box":
        b, h, t = g("width"), g("depth"), g("wall")
        out = rounded(b, h, g("outer_radius")) + rounded(b - 2 * t, h - 2 * t, g("inner_radius"), -1.0)
        return out, (-b / 2, b / 2, -h / 2, h / 2)
    b, h, tw, tf, r = g("width"), g("depth"), g("web"), g("flange"), g("fillet")
    if shape == "i":
        out = [rect(b, tf, 0, (h - tf) / 2), rect(b, tf, 0, -(h - tf) / 2), rect(tw, h - 2 * tf, 0, 0)]
        if r > 0:
            for right in (True, False):
                for up in (True, False):
                    out.append(spandrel(r, tw / 2 if right else -tw / 2, (-1 if up else 1) * (h / 2 - tf), right, up))
        return out, (-b / 2, b / 2, -h / 2, h / 2)
    if shape == "channel":  # web on the left, its back at z = 0
        out = [rect(b, tf, b / 2, (h - tf) / 2), rect(b, tf, b / 2, -(h - tf) / 2), rect(tw, h - 2 * tf, tw / 2, 0)]
        if r > 0:
            for up in (True, False):
                out.append(spandrel(r, tw, (-1 if up else 1) * (h / 2 - tf), True, up))
        return out, (0.0, b, -h / 2, h / 2)
    if shape == "tee":  # flange at the top, underside of the stem at y = 0
        out = [rect(b, tf, 0, h - tf / 2), rect(tw, h - tf, 0, (h - tf) / 2)]
        if r > 0:
            for right in (True, False):
                out.append(spandrel(r, tw / 2 if right else -tw / 2, h - tf, right, False))
        return out, (-b / 2, b / 2, 0.0, h)
    if shape == "angle":  # an upright L, its heel at the origin
        t = g("thickness")
        return [rect(b, t, b / 2, t / 2), rect(t, h - t, t / 2, t + (h - t) / 2)], (0.0, b, 0.0, h)
    if shape == "plates":
        out = [rect(q["width"], q["height"], 0.0, q["at"]) for q in p["plates"]]
        top = max(q["at"] + q["height"] / 2 for q in p["plates"])
        bottom = min(q["at"] - q["height"] / 2 for q in p["plates"])
        half = max(q["width"] for q in p["plates"]) / 2
        return out, (-half, half, bottom, top)
    raise ValueError(f"unknown shape {shape}")


def properties(shape, p, turned=False):
    """area, inertia, top, bottom, minor_inertia; `turned` turns the drawing 90 deg anticlockwise."""
    if shape == "given":
        return {k: p[k] for k in ("area", "inertia", "top", "bottom", "minor_inertia") if k in p}
    parts, (z0, z1, y0, y1) = pieces(shape, p)
    area = sum(q[0] for q in parts)
    zc = sum(q[0] * q[1] for q in parts) / area
    yc = sum(q[0] * q[2] for q in parts) / area
    about_z = sum(q[3] + q[0] * (q[2] - yc) ** 2 for q in parts)
    about_y = sum(q[4] + q[0] * (q[1] - zc) ** 2 for q in parts)
    if turned:  # old z points up now
        return {"area": area, "inertia": about_y, "top": z1 - zc, "bottom": zc - z0, "minor_inertia": about_z}
    return {"area": area, "inertia": about_z, "top": y1 - yc, "bottom": yc - y0, "minor_inertia": about_y}
