"""Writes testdata/validation/published.txt, apart from the program.

    python3 testdata/peer/published.py > testdata/validation/published.txt

The table compares M-10 and M-11 with published measurements. The program's own
test works the same table out and compares it with this one.
"""
import csv
import os
import statistics

HERE = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "validation")
G = 9.80665
SCATTER = 0.10  # twice the 5 % by which repeated pairs differ, see drop-tests.csv


def rows(name):
    with open(os.path.join(HERE, name), encoding="utf-8") as f:
        return list(csv.DictReader(line for line in f if not line.startswith("#")))


def modulus(peak, weight, factor):
    return peak * (peak - 2 * weight) / (2 * weight * factor)


def predicted(weight, mod, factor):
    return weight + (weight * weight + 2 * weight * mod * factor) ** 0.5


class Test:
    def __init__(self, row):
        self.tears = row["tear_webbing_absorber"] == "yes"
        self.kind = row["lanyard_type"] + ", " + row["material"] + (", stitching tears" if self.tears else "")
        self.weight = float(row["mass_kg"]) * G
        self.factor = float(row["fall_factor"])
        self.peak = float(row["measured_peak_N"])
        self.modulus = modulus(self.peak, self.weight, self.factor) if self.factor > 0 else None


def drops():
    kinds = {}
    for row in rows("drop-tests.csv"):
        t = Test(row)
        kinds.setdefault((t.kind, t.tears), []).append(t)
    out = []
    for (kind, tears), tests in kinds.items():
        errors = []
        for t in tests:
            others = [o.modulus for o in tests if o is not t and o.modulus is not None]
            mod = statistics.median(others)
            errors.append((predicted(t.weight, mod, t.factor) - t.peak) / t.peak)
        errors.sort()
        known = [t for t in tests if t.modulus is not None]
        low, high = min(t.factor for t in known), max(t.factor for t in known)
        at_low = statistics.mean(t.modulus for t in known if t.factor == low)
        at_high = statistics.mean(t.modulus for t in known if t.factor == high)
        out.append((errors, kind, tears, low, at_low, high, at_high))
    out.sort(key=lambda k: (k[0][0], k[1]))
    print("Drop tests of lanyards, rigid mass, against M-10")
    print()
    print("The modulus of a test is the median of the implied moduli of the other tests of")
    print("its kind. Error: predicted less measured peak, over the measured one, in per")
    print("cent; furthest below the measurement first. Minus: the model is too low.")
    print()
    for errors, kind, tears, low, at_low, high, at_high in out:
        print(kind)
        print("  n %d; error %s" % (len(errors), " ".join("%+.1f" % (100 * e) for e in errors)))
        words = []
        if low < high:
            words.append("implied modulus %.1f kN at fall factor %g, %.1f kN at %g" % (at_low / 1e3, low, at_high / 1e3, high))
        if tears:
            words.append("not linear elastic")
        elif low < high and at_high > (1 + SCATTER) * at_low:
            words.append("stiffens")
        for w in words:
            print("  " + w)
    print("tests: %d" % sum(len(k[0]) for k in out))


def ropes():
    ratios = []
    for row in rows("ropes-en892.csv"):
        u = float(row["impact_force_kN"]) * 1e3
        strain = u / modulus(u, 80 * G, 1.77)
        ratios.append(strain / (float(row["dyn_elong_pct"]) / 100))
    ratios.sort()
    print("Dynamic ropes, M-11 against the catalogue")
    print()
    print("Stretch at the rated impact force by the modulus of M-11 (80 kg, fall factor")
    print("1.77), over the dynamic elongation of the catalogue.")
    print()
    n = len(ratios)
    for name, at in (("least", 0), ("1 in 20 below", n // 20), ("1 in 4 below", n // 4), ("middle", n // 2),
                     ("1 in 4 above", n - 1 - n // 4), ("1 in 20 above", n - 1 - n // 20), ("greatest", n - 1)):
        print("  %-14s %.3f" % (name, ratios[at]))
    print("ropes: %d" % n)


drops()
print()
ropes()
