"""Points of Sobol's sequence in 128 dimensions, from SciPy, in the order of the Gray code."""

from scipy.stats import qmc

points = qmc.Sobol(d=128, scramble=False, bits=32).random(1024)
rows = [*range(32), 100, 511, 777, 1023]
columns = [*range(10), 20, 39, 40, 63, 79, 100, 127]
with open("points.csv", "w", encoding="utf-8") as out:
    out.write(",".join(["index", *(f"d{column}" for column in columns)]) + "\n")
    for row in rows:
        out.write(",".join([str(row), *(repr(float(points[row, column])) for column in columns)]) + "\n")
