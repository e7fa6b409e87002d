"""The sampler of method M1 written a second time, from schema/conformance/README.md alone: python3 sampler.py

Reads schema/conformance/M1/sampler.json, makes every number again with whole-number arithmetic for the generator and
Python's own doubles for the rest, and prints how many agree. Exit status 1 if any does not.
"""
import hashlib
import json
import math
import os
import sys

HERE = os.path.dirname(os.path.abspath(__file__))
MASK = (1 << 64) - 1
# The generator's published jump polynomial.
JUMP = [0x180ec6d33cfd0aba, 0xd5a61266f0c9392c, 0xa9582618e03fc9aa, 0x39abdc4529b1661c]
STREAM = {'replicates': 0, 'misfit': 1, 'sealed': 2}


def rotl(x, k):
    return ((x << k) | (x >> (64 - k))) & MASK


class Generator:
    def __init__(self, seed):
        self.s = [int.from_bytes(seed[8 * i:8 * i + 8], 'little') for i in range(4)]

    def step(self):
        s = self.s
        t = (s[1] << 17) & MASK
        s[2] ^= s[0]
        s[3] ^= s[1]
        s[1] ^= s[2]
        s[0] ^= s[3]
        s[2] ^= t
        s[3] = rotl(s[3], 45)

    def word53(self):
        out = (rotl((self.s[1] * 5) & MASK, 7) * 9) & MASK
        self.step()
        return out >> 11

    def uniform(self):
        return self.word53() * 2.0 ** -53

    def jump(self):
        out = [0, 0, 0, 0]
        for word in JUMP:
            for bit in range(64):
                if word >> bit & 1:
                    out = [a ^ b for a, b in zip(out, self.s)]
                self.step()
        self.s = out


def binomial(g, n, p):
    if n == 0 or p <= 0:
        return 0
    if p >= 1:
        return n
    if p > 0.5:
        return n - small(g, n, 1 - p)
    return small(g, n, p)


def small(g, n, p):
    return walk(g, n, p) if n * p < 10 else rejection(g, n, p)


def walk(g, n, p):
    odds = p / (1 - p)
    none, square, left = 1.0, 1 - p, n
    while left > 0:
        if left % 2:
            none *= square
        square *= square
        left //= 2
    while True:
        u, P, x = g.uniform(), none, 0
        while x <= n:
            if u < P:
                return x
            u -= P
            x += 1
            P *= ((n - x + 1) / x) * odds


def log_mass(n, p, k):
    return math.lgamma(n + 1) - math.lgamma(k + 1) - math.lgamma(n - k + 1) + k * math.log(p) + (n - k) * math.log1p(-p)


def rejection(g, n, p):
    spread = math.sqrt(n * p * (1 - p))
    b = 1.15 + 2.53 * spread
    a = -0.0873 + 0.0248 * b + 0.01 * p
    centre, squeeze = n * p + 0.5, 0.92 - 4.2 / b
    m = math.floor((n + 1) * p)
    while True:
        u = g.uniform() - 0.5
        v = g.uniform()
        us = 0.5 - abs(u)
        k = math.floor((2 * a / us + b) * u + centre) if us > 0 else -1
        if us >= 0.07 and v <= squeeze:
            return k
        if not 0 <= k <= n:
            continue
        h = v * (2.83 + 5.1 / b) * spread / (a / (us * us) + b)
        if h <= 0 or math.log(h) <= log_mass(n, p, k) - log_mass(n, p, m):
            return k


def table(n, p):
    mode = min(n, math.floor((n + 1) * p))
    reach = math.ceil(9 * math.sqrt(n * p * (1 - p)) + 40)
    first, last = max(0, mode - reach), min(n, mode + reach)
    if last - first + 1 > 4096:
        return None
    odds, mass = p / (1 - p), {mode: 1.0}
    for k in range(mode + 1, last + 1):
        mass[k] = mass[k - 1] * ((n - k + 1) / k) * odds
    for k in range(mode - 1, first - 1, -1):
        mass[k] = mass[k + 1] * ((k + 1) / (n - k)) / odds
    total = math.fsum(mass.values())
    out, total_so_far = [], 0.0
    for k in range(first, last + 1):
        total_so_far += mass[k] / total
        out.append((k, total_so_far))
    return out


def by_table(g, n, p):
    found = table(n, p)
    if found is None:
        return binomial(g, n, p)
    u = g.uniform()
    return next((k for k, F in found if u < F), found[-1][0])


def multinomial(g, shots, rows):
    out = []
    for n, row in zip(shots, rows):
        left, counts = n, []
        for o in range(len(row) - 1):
            tail = 0.0
            for q in reversed(row[o:]):
                tail += q
            p = row[o] / tail if tail > 0 else 0
            k = by_table(g, left, p) if o == 0 and 0 < p < 1 else binomial(g, left, p)
            counts.append(k)
            left -= k
        out.append(counts + [left])
    return out


def main():
    vector = json.load(open(os.path.join(HERE, '../../../schema/conformance/M1/sampler.json')))
    good, bad = 0, []

    def hold(what, got, want):
        nonlocal good
        if got == want:
            good += 1
        else:
            bad.append((what, got, want))

    hold('seed', hashlib.sha256(vector['seedText'].encode()).hexdigest(), vector['seed'])
    for s in vector['streams']:
        g = Generator(hashlib.sha256(f"{s['contentId']}:{s['method']}".encode()).digest())
        hold('jumps', 3 * s['patch'] + STREAM[s['purpose']], s['jumps'])
        for _ in range(s['jumps']):
            g.jump()
        hold('stream', [g.word53() for _ in s['first']], s['first'])
    for s in vector['binomials']:
        g = Generator(bytes.fromhex(s['seed']))
        hold(('binomial', s['n'], s['p']), [binomial(g, s['n'], s['p']) for _ in s['draws']] + [g.word53()], s['draws'] + [s['next']])
    for s in vector['tables']:
        g = Generator(bytes.fromhex(s['seed']))
        hold(('table', s['n'], s['p']), [by_table(g, s['n'], s['p']) for _ in s['draws']], s['draws'])
    for s in vector['multinomials']:
        g = Generator(bytes.fromhex(s['seed']))
        hold('multinomial', [multinomial(g, s['shots'], s['probabilities']) for _ in s['replicates']], s['replicates'])
    print(f'{good} agree, {len(bad)} do not, Python {sys.version.split()[0]}')
    for line in bad:
        print(line)
    sys.exit(1 if bad else 0)


main()
