"""Points of Sobol's sequence in 128 dimensions, from SciPy, in the order of the Gray code."""

from scipy.stats import qmc

points = qmc.Sobol(d=128, scramble=False, bits=32).random(1024)
rows = [*range(32), 100, 511, 777, 1023]
columns = [*range(10), 20, 39, 40, 63, 79, 100, 127]
with open("points.csv", "w", encoding="utf-8") as out:
    out.write(",".join(["index", *(f"d{column}" for column in columns)]) + "\n")
    for row in rows:
        out.write(",".join([str(row), *(repr(float(points[row, column])) for column in columns)]) + "\n")


WORD = 0xFFFFFFFF


def mix(word):
    word = ((word ^ (word >> 16)) * 0x85EBCA6B) & WORD
    word = ((word ^ (word >> 13)) * 0xC2B2AE35) & WORD
    return word ^ (word >> 16)


def chain(*words):
    value = 0x9E3779B9
    for word in words:
        value = mix((value * 31 + word) & WORD)
    return value


def scramble(digits, key):
    """Turns each digit over, or not, by the word at its node of the binary tree."""
    result = ""
    for place, digit in enumerate(digits):
        node = int("1" + digits[:place], 2)
        flip = mix((mix(node ^ key) + key) & WORD) & 1
        result += str(int(digit) ^ flip)
    return result


with open("scrambled.csv", "w", encoding="utf-8") as out:
    out.write("index,dimension,seed,coordinate\n")
    for index, dimension, seed in [(0, 0, 0), (1, 0, 1), (7, 3, 1), (100, 39, 12345), (777, 127, 4294967295), (1023, 63, 42)]:
        digits = format(int(points[index, dimension] * 2**32), "032b")
        word = int(scramble(digits, chain(seed, dimension)), 2)
        out.write(f"{index},{dimension},{seed},{(word + 0.5) / 2**32!r}\n")
