"""Least-squares Gaussian fits of Slater functions in 40-digit arithmetic (needs mpmath).

Independent of engine/basis: the error function is mpmath's, and the exponents are found as the root of the slope by
mpmath's own solver, with derivatives by differences. Writes ../slater-fit-high-precision.json. Run from this folder:
    python3 slater-fit-high-precision.py
"""
import json
import mpmath as mp

mp.mp.dps = 40

ROUGH = {
    '1s': [[0.27], [0.85, 0.15], [2.2, 0.41, 0.11], [5.2, 0.95, 0.265, 0.088], [11.3, 2.07, 0.579, 0.198, 0.0745],
           [23.1, 4.24, 1.19, 0.407, 0.158, 0.0651]],
    '2sp': [[0.137], [0.384, 0.0975], [0.994, 0.231, 0.0751], [2.32, 0.503, 0.164, 0.0628],
            [5.04, 1.03, 0.329, 0.128, 0.0545], [10.3, 2.04, 0.634, 0.244, 0.106, 0.0486]],
    '3sp': [[0.0716], [0.194, 0.0666], [0.483, 0.135, 0.0527], [0.922, 0.253, 0.0998, 0.0444],
            [1.71, 0.465, 0.179, 0.0807, 0.0391], [3.08, 0.825, 0.309, 0.138, 0.0685, 0.0353]],
}


def moment(k, a):
    """integral of r^k exp(-r - a r^2) over r > 0"""
    z = 1 / (2 * mp.sqrt(a))
    values = [mp.sqrt(mp.pi) * z * mp.exp(z * z) * mp.erfc(z)]
    values.append((1 - values[0]) / (2 * a))
    for j in range(1, k):
        values.append((j * values[j - 1] - values[j]) / (2 * a))
    return values[k]


def with_slater(n, l, a):
    slater = mp.mpf(2) ** (n + mp.mpf(1) / 2) / mp.sqrt(mp.factorial(2 * n))
    gaussian = mp.sqrt(2 * (2 * a) ** (l + mp.mpf(3) / 2) / mp.gamma(l + mp.mpf(3) / 2))
    return slater * gaussian * moment(n + l + 1, a)


def between(l, a, b):
    return (2 * mp.sqrt(a * b) / (a + b)) ** (l + mp.mpf(3) / 2)


def best(n, l, exponents):
    """overlap with the Slater function and normalised coefficients"""
    m = len(exponents)
    s = mp.matrix(m)
    for i in range(m):
        for j in range(m):
            s[i, j] = between(l, exponents[i], exponents[j])
    b = mp.matrix([with_slater(n, l, a) for a in exponents])
    c = mp.lu_solve(s, b)
    overlap = mp.sqrt((b.T * c)[0])
    return overlap, [x / overlap for x in c]


def slope(n, l, exponents):
    """derivative of the best overlap by each ln a: the coefficients stay, being stationary"""
    overlap, c = best(n, l, exponents)
    p = l + mp.mpf(3) / 2
    result = []
    for j, a in enumerate(exponents):
        b1 = with_slater(n, l, a) * (p / 2 - a * moment(n + l + 3, a) / moment(n + l + 1, a))
        s1 = sum(c[k] * -p / 2 * (a - x) / (a + x) * between(l, a, x) for k, x in enumerate(exponents))
        result.append(c[j] * (b1 - overlap * s1))
    return result


fits = []
for shell, starts in ROUGH.items():
    n, momenta = int(shell[0]), [0] if shell == '1s' else [0, 1]
    for start in starts:
        def equations(*logarithms):
            exponents = [mp.exp(u) for u in logarithms]
            parts = [slope(n, l, exponents) for l in momenta]
            return [sum(column) for column in zip(*parts)]
        root = mp.findroot(equations, [mp.log(x) for x in start], tol=1e-50, maxsteps=50)
        exponents = [mp.exp(u) for u in root]
        parts = [best(n, l, exponents) for l in momenta]
        text = lambda x: mp.nstr(x, 20)
        fits.append({
            'shell': shell, 'gaussians': len(start), 'exponents': [text(x) for x in exponents],
            'coefficients': [[text(x) for x in part[1]] for part in parts],
            'squaredError': text(sum(2 - 2 * part[0] for part in parts)),
        })

with open('../slater-fit-high-precision.json', 'w') as out:
    out.write('[\n' + ',\n'.join(json.dumps(fit) for fit in fits) + '\n]\n')
