"""Functions of statistics to 17 digits, worked with 50 digits by mpmath from their defining integrals."""

from mpmath import betainc, erfc, erfinv, exp, findroot, gammainc, loggamma, mp, mpf, sqrt

mp.dps = 50


def normal_cdf(x):
    return erfc(-x / sqrt(2)) / 2


def normal_quantile(p):
    start = -sqrt(2) * erfinv(1 - 2 * p) if p > mpf("1e-15") else -sqrt(-2 * mp.log(p))
    return findroot(lambda x: mp.log(normal_cdf(x)) - mp.log(p), start)


CASES = {
    "normalQuantile": (normal_quantile, ["1e-300", "1e-20", "1e-5", "0.01", "0.0749", "0.0751", "0.3", "0.5625", "0.975"]),
    "normalCdf": (normal_cdf, ["-37", "-20", "-5", "-1.5", "-0.25", "0.125", "2", "6"]),
    "logGamma": (loggamma, ["0.125", "0.5", "1.5", "3.75", "17", "170.5", "1000"]),
    "upperGamma": (
        lambda a, x: gammainc(a, x, regularized=True),
        ["0.5 0.125", "0.5 30", "1 2", "3 7.5", "20 12.25", "100 130", "500 450"],
    ),
    "lowerGamma": (
        lambda a, x: gammainc(a, 0, x, regularized=True),
        ["0.5 0.125", "3 0.5", "20 12.25", "100 130", "500 450"],
    ),
    "incompleteBeta": (
        lambda x, a, b: betainc(a, b, 0, x, regularized=True),
        ["0.5 2 3", "0.25 81 183", "0.03125 0.5 20.5", "0.9375 8 1", "0.3125 500 900", "0.75 15.5 4"],
    ),
}

with open("values.csv", "w", encoding="utf-8") as out:
    out.write("function,arguments,expected\n")
    for name, (function, inputs) in CASES.items():
        for text in inputs:
            # The nearest double is what our functions are given.
            value = function(*(mpf(float(part)) for part in text.split()))
            out.write(f"{name},{text},{mp.nstr(value, 17)}\n")
