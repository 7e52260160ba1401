"""The five-part path by scipy's solve_ivp, RK45 at 1e-8, with its events.

    python3 testdata/peer/five_part.py [RUNS]

Slack 0.2 m after 1.6 m of free fall, webbing of 60 kN/m up to 4 kN, a plateau
of 0.4 m rising by 2 kN/m, 80 kN/m after it, 100 kN/m on the way back with what
stays, 150 N s/m beside it, 100 kg, 0.5 s. Loops in one process and prints the
process time of one run, the peak and the state at the end.
"""
import sys
import time

from scipy.integrate import solve_ivp

G, MASS, C, BACK, END = 9.80665, 100.0, 150.0, 100e3, 0.5
W = MASS * G
CORNER = 4000 / 60000
SPANS = [(0.0, 0.0, 60e3, CORNER), (CORNER, 4000.0, 2e3, CORNER + 0.4), (CORNER + 0.4, 4800.0, 80e3, 1e9)]


def event(f, direction):
    f.terminal, f.direction = True, direction
    return f


REST = event(lambda t, y: y[1], -1)
TOP = event(lambda t, y: y[1], 1)
FREE = lambda t, y: [y[1], G]


def go(f, t, y, events):
    s = solve_ivp(f, (t, END), y, method="RK45", rtol=1e-8, atol=1e-8, events=events)
    hit = [i for i, e in enumerate(s.t_events or []) if len(e)]
    return s.t[-1], [s.y[0, -1], s.y[1, -1]], hit[0] if hit else None, s


def run():
    t, y, peak = 0.0, [-0.2, (2 * G * 1.6) ** 0.5], 0.0
    t, y, hit, _ = go(FREE, t, y, [event(lambda t, y: y[0], 1)])
    span = 0
    while hit is not None:
        x0, f0, k, x1 = SPANS[span]
        force = lambda x, v: f0 + k * (x - x0) + C * v
        t, y, hit, s = go(lambda t, y: [y[1], G - force(y[0], y[1]) / MASS], t, y,
                          [REST, event(lambda t, y: y[0] - x1, 1)])
        peak = max(peak, max(force(x, v) for x, v in zip(s.y[0], s.y[1])))
        if hit == 0:
            break
        span += 1
    if hit is None:
        return peak, y
    top, hold = y[0], f0 + k * (y[0] - x0)
    stay = top - hold / BACK
    while hit is not None:
        back = lambda x, v: hold + BACK * (x - top) + C * v
        t, y, hit, _ = go(lambda t, y: [y[1], G - back(y[0], y[1]) / MASS], t, y,
                          [event(lambda t, y: back(y[0], y[1]), -1), event(lambda t, y: y[0] - top, 1)])
        if hit is None or hit == 1:
            break
        t, y, hit, _ = go(FREE, t, y, [event(lambda t, y: y[0] - stay, 1)])
    return peak, y


def main():
    n = int(sys.argv[1]) if len(sys.argv) > 1 else 200
    run()
    start = time.process_time()
    for _ in range(n):
        peak, y = run()
    spent = (time.process_time() - start) / n
    print("scipy RK45 1e-8: %.3f us a run, %d runs, peak %.6f N, x %.9f m, v %.9f m/s" % (spent * 1e6, n, peak, y[0], y[1]))


main()
