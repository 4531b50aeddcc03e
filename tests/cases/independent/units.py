"""Quantities as text, to SI numbers.  Its own table, none of it taken from the program."""
import re
from math import pi

IN = 0.0254
LB = 0.45359237
G0 = 9.80665
LBF = LB * G0
# factor to SI and powers of (length, mass, time, temperature)
TABLE = {
    "mm": (1e-3, (1, 0, 0, 0)), "cm": (1e-2, (1, 0, 0, 0)), "m": (1.0, (1, 0, 0, 0)), "km": (1e3, (1, 0, 0, 0)),
    "in": (IN, (1, 0, 0, 0)), "ft": (12 * IN, (1, 0, 0, 0)),
    "kg": (1.0, (0, 1, 0, 0)), "t": (1e3, (0, 1, 0, 0)), "g": (1e-3, (0, 1, 0, 0)), "lb": (LB, (0, 1, 0, 0)), "s": (1.0, (0, 0, 1, 0)),
    "N": (1.0, (1, 1, -2, 0)), "kN": (1e3, (1, 1, -2, 0)), "MN": (1e6, (1, 1, -2, 0)),
    "lbf": (LBF, (1, 1, -2, 0)), "kip": (1e3 * LBF, (1, 1, -2, 0)),
    "Pa": (1.0, (-1, 1, -2, 0)), "kPa": (1e3, (-1, 1, -2, 0)), "MPa": (1e6, (-1, 1, -2, 0)), "GPa": (1e9, (-1, 1, -2, 0)),
    "psi": (LBF / IN**2, (-1, 1, -2, 0)), "ksi": (1e3 * LBF / IN**2, (-1, 1, -2, 0)), "psf": (LBF / (12 * IN) ** 2, (-1, 1, -2, 0)),
    "K": (1.0, (0, 0, 0, 1)), "degC": (1.0, (0, 0, 0, 1)), "degF": (5 / 9, (0, 0, 0, 1)),
    "rad": (1.0, (0, 0, 0, 0)), "mrad": (1e-3, (0, 0, 0, 0)), "deg": (pi / 180, (0, 0, 0, 0)),
    "Nm": (1.0, (2, 1, -2, 0)), "kNm": (1e3, (2, 1, -2, 0)), "MNm": (1e6, (2, 1, -2, 0)),
}
LENGTH, FORCE, MOMENT, STRESS = (1, 0, 0, 0), (1, 1, -2, 0), (2, 1, -2, 0), (-1, 1, -2, 0)
AREA, INERTIA, LINE_LOAD, DENSITY, WEIGHT_DENSITY = (2, 0, 0, 0), (4, 0, 0, 0), (0, 1, -2, 0), (-3, 1, 0, 0), (-2, 1, -2, 0)
TEMPERATURE, EXPANSION, ANGLE, PURE, ACCELERATION = (0, 0, 0, 1), (0, 0, 0, -1), (0, 0, 0, 0), (0, 0, 0, 0), (1, 0, -2, 0)
NUMBER = re.compile(r"\s*([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)")
SUPERSCRIPT = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹⁻", "0123456789-")


def unit(text):
    """Factor and dimension of a unit such as kN·m/rad, lbf/ft^2, /K, 1/m."""
    text = text.strip().translate(SUPERSCRIPT)
    factor, dims, sign = 1.0, [0, 0, 0, 0], 1
    for token in re.findall(r"[A-Za-z]+(?:\^?-?\d+)?|[/·.*×]|1(?=/)", text):
        if token == "/":
            sign = -1
        elif token in "·.*×":
            continue  # a product after a quotient stays below the line: kN/m·s is not used
        elif token == "1":
            continue
        else:
            name, power = re.fullmatch(r"([A-Za-z]+)\^?(-?\d+)?", token).groups()
            f, d = TABLE[name]
            n = sign * int(power or 1)
            factor *= f**n
            dims = [a + n * b for a, b in zip(dims, d)]
    return factor, tuple(dims)


def parse(text):
    """(value in SI, dimension) of a quantity, feet and inches included."""
    text = str(text).strip()
    value, dims, rest, negative = 0.0, None, text, text.startswith("-")
    while rest.strip():
        hit = NUMBER.match(rest)
        if not hit:
            raise ValueError(f"not a quantity: {text}")
        rest = rest[hit.end():]
        following = re.match(r"\s*([^\s\d+-][^\s]*|1/[^\s]+)?", rest)
        word = following.group(1) or ""
        rest = rest[following.end():]
        factor, d = unit(word)
        if dims is not None and d != dims:
            raise ValueError(f"mixed dimensions: {text}")
        dims = d
        value += abs(float(hit.group(1))) * factor
    return (-value if negative else value), dims


def si(text, dims):
    value, d = parse(text)
    if value == 0 and d == (0, 0, 0, 0):
        return 0.0
    if dims == DENSITY and d == WEIGHT_DENSITY:
        return value / G0
    if d != dims:
        raise ValueError(f"{text}: dimension {d}, expected {dims}")
    return value
