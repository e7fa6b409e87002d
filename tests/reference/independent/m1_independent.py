"""An independent reading of method M1: dataset in, estimate out, with numpy and scipy alone.

usage: m1_independent.py DATASET.json [--class CLASS.json] [--seal SEAL.json] [--predict CIRCUITS.json]
                         [--replicates N] [--seed N] [--out RESULT.json]

Written from the method's text without sight of the TypeScript code, as the outside reference of its tests.
Point values are exact up to rounding; intervals use numpy's own generator, so they agree within Monte-Carlo error.
"""
import argparse
import json
import os
import sys

for name in ('OPENBLAS_NUM_THREADS', 'OMP_NUM_THREADS', 'MKL_NUM_THREADS'):
    os.environ.setdefault(name, '2')

import numpy as np  # noqa: E402

import m1_figures as fig  # noqa: E402
from m1_bench import bench_figures, class_labels, sealed_figures  # noqa: E402
from m1_design import design, determined  # noqa: E402
from m1_patch import joint_patch, misfit, pair_patch, replicates  # noqa: E402
from m1_quantum import smallest_choi  # noqa: E402
from m1_register import Chained, Joint  # noqa: E402


def figure(key, value, sample, qubits, B, gate=None, depth=None, first=None, kind='percentile', **more):
    out = {'key': key, 'depth': depth, 'gate': gate, 'qubits': qubits, 'value': None, 'standardError': None,
           'intervals': None, 'firstOrder': None, 'determined': False, 'reason': None, 'extrapolated': False,
           'firstOrderOnly': False, 'replicates': B}
    if value is not None:
        se, levels = fig.intervals(value, sample, kind)
        out.update(value=float(value), standardError=se, intervals=levels, determined=True,
                   firstOrder=None if first is None else float(first))
    out.update(more)
    return out


def gate_figures(patch, e_b, base_b, B):
    """Gate loss and angle error of the gates a patch estimates, error per gate of its whole set."""
    L, D = patch.layout, patch.layout.dim
    maps = patch.model()[0]
    first = patch.layout.apply(patch.base, patch.first)[0]
    maps_b = L.apply(base_b, e_b)[0]
    loss_rows = np.zeros((len(L.free), L.columns))
    for i in range(len(L.free)):
        for a in range(1, D):
            loss_rows[i, i * D * (D - 1) + (a - 1) * D + a] = -1 / D
    pair = not L.spam
    known = [patch.complete] * len(L.free) if pair else list(determined(patch.inverse, loss_rows) & (not patch.too_weak))
    out = []
    for i, k in enumerate(L.free):
        ideal, common = patch.ideal[0][k], dict(qubits=patch.qubits, B=B, gate=L.labels[k])
        if not known[i]:
            why = 'unsound pair' if pair else 'not determined by this gate set'
            out += [figure('gate-loss', None, None, reason=why, **common), figure('angle-error', None, None, reason=why, **common)]
            continue
        one = lambda f, m: f(m[None], ideal)
        out.append(figure('gate-loss', one(fig.gate_loss, maps[k])[0], fig.gate_loss(maps_b[:, k], ideal),
                          first=one(fig.gate_loss, first[k])[0], **common))
        angle = one(fig.angle_error, maps[k])
        if angle is None:
            out.append(figure('angle-error', None, None, reason='not one rotation', **common))
        else:
            out.append(figure('angle-error', angle[0], fig.angle_error(maps_b[:, k], ideal),
                              first=one(fig.angle_error, first[k])[0], **common))
    if not pair:
        mean = loss_rows.mean(axis=0)
        common = dict(qubits=patch.qubits, B=B)
        if patch.too_weak or not determined(patch.inverse, mean)[0]:
            out.append(figure('error-per-gate', None, None, reason='not determined by this gate set', **common))
        elif not fig.error_defined(patch.ideal[0]):
            out.append(figure('error-per-gate', None, None, reason='not defined for this gate set', **common))
        else:
            out.append(figure('error-per-gate', fig.error_per_gate(maps, patch.ideal[0]),
                              fig.error_per_gate_replicates(maps_b, patch.ideal[0]),
                              first=fig.error_per_gate(first, patch.ideal[0]), **common))
    return out


def describe(patch, expected):
    L, n = patch.layout, len(patch.qubits)
    maps = patch.model()[0]
    errors = L.unpack(patch.e)[0]
    sound = patch.rank == expected and not patch.ambiguous and patch.ratio >= 0.01
    s = patch.inverse.spectrum
    return {'qubits': patch.qubits, 'columns': L.columns, 'gaugeDimension': patch.gauge, 'rank': patch.rank,
            'conditionRatio': patch.ratio, 'rankAmbiguous': patch.ambiguous, 'complete': patch.complete, 'sound': bool(sound),
            'settled': patch.settled, 'spectrum': [float(x) for x in s], 'misfit': patch.misfit,
            'gateMaps': [{'gate': L.labels[k], 'errorMap': errors[i].ravel().tolist(),
                          'smallestChoiEigenvalue': smallest_choi(maps[k], n)} for i, k in enumerate(L.free)]}


def estimate(dataset, gate_class=None, seal=None, predict=None, B=2000, seed=1):
    rng = np.random.default_rng(seed)
    sealed = set(seal['sealed']) if seal else set()
    open_ = lambda p: [c for c in p['circuits'] if c['id'] not in sealed]
    chained = len(dataset['patches']) > 1
    figures, described = [], []
    if chained and len(dataset['register']) >= 5:
        B = min(B, 200)
    few = 2000 if not chained and len(dataset['register']) == 1 else 200
    if not chained:
        p = dataset['patches'][0]
        patch = joint_patch(dataset, p['qubits'], open_(p))
        C = design(patch.layout, patch.ideal, patch.data.sequences)
        e_b, base = replicates(patch, rng, B)
        patch.misfit = misfit(patch, C, rng, few)
        expected = gate_class['expectedRank'] if gate_class else patch.layout.columns - patch.gauge
        described.append(describe(patch, expected))
        figures += gate_figures(patch, e_b, base, B)
        predictor, everything = Joint(patch), [patch]
        model, model_b, first = patch.model(), patch.layout.apply(base, e_b), patch.layout.apply(base, patch.first)
    else:
        locals_, pairs, model, model_b, first = {}, {}, {}, {}, {}
        singles = [p for p in dataset['patches'] if len(p['qubits']) == 1]
        doubles = [p for p in dataset['patches'] if len(p['qubits']) == 2]
        for p in singles:
            q = p['qubits'][0]
            patch = locals_[q] = joint_patch(dataset, p['qubits'], open_(p))
            C = design(patch.layout, patch.ideal, patch.data.sequences)
            e_b, base = replicates(patch, rng, B)
            patch.misfit = misfit(patch, C, rng, 2000)
            described.append(describe(patch, patch.layout.columns - patch.gauge))
            figures += gate_figures(patch, e_b, base, B)
            model[q], model_b[q], first[q] = patch.model(), patch.layout.apply(base, e_b), patch.layout.apply(base, patch.first)
        for p in doubles:
            key = tuple(p['qubits'])
            own = [locals_[q] for q in key]
            patch = pairs[key] = pair_patch(dataset, p['qubits'], open_(p), own)
            C = design(patch.layout, patch.base, patch.data.sequences)
            e_b, base = replicates(patch, rng, B, [model_b[q] for q in key])
            patch.misfit = misfit(patch, C, rng, min(B, 200), tuple(x[:min(B, 200)] for x in base))
            described.append(describe(patch, patch.layout.columns))
            figures += gate_figures(patch, e_b, base, B)
            model[key], model_b[key], first[key] = patch.model(), patch.layout.apply(base, e_b), patch.layout.apply(patch.base, patch.first)
        predictor, everything = Chained(dataset, locals_, pairs), list(locals_.values()) + list(pairs.values())
    context = dict(predictor=predictor, model=model, model_b=model_b, first=first, B=B, figure=figure, rng=rng,
                   register=list(range(len(dataset['register']))) if chained else dataset['patches'][0]['qubits'],
                   longest=max(p.longest for p in everything),
                   first_order_only=not chained and not everything[0].complete,
                   misfit_out=not chained and not everything[0].complete and abs(everything[0].misfit['sigmas']) > 2.58)
    figures += bench_figures(class_labels(dataset, gate_class) if gate_class else None, context)
    more, check = sealed_figures(dataset, sealed, context)
    result = {'format': 'evenbeam.result', 'formatVersion': '1.0.0', 'method': 'M1', 'replicates': B,
              'sealed': sum(c['id'] in sealed for p in dataset['patches'] for c in p['circuits']),
              'patches': described, 'figures': figures + more, 'sealedCheck': check, 'predictions': []}
    for c in predict['circuits'] if predict else []:
        result['predictions'].append(prediction(c, context))
    return result


def prediction(circuit, context):
    out = {'id': circuit['id'], 'determined': context['predictor'].determined(circuit), 'reason': None,
           'firstOrderOnly': context['first_order_only'], 'probabilities': None, 'intervals': None}
    if not out['determined']:
        out['reason'] = 'not determined by this gate set'
        return out
    n = len(circuit['qubits'])
    keys = [format(o, 'b').zfill(n) for o in range(2 ** n)]
    p = context['predictor'].predict(context['model'], circuit)
    out['probabilities'] = dict(zip(keys, map(float, p)))
    if not context['misfit_out']:
        ends = np.quantile(context['predictor'].predict(context['model_b'], circuit), [0.025, 0.975], axis=0)
        out['intervals'] = {k: [float(a), float(b)] for k, a, b in zip(keys, *ends)}
    return out


def main():
    ap = argparse.ArgumentParser()
    ap.add_argument('dataset')
    for name in ('--class', '--seal', '--predict', '--out'):
        ap.add_argument(name)
    ap.add_argument('--replicates', type=int, default=2000)
    ap.add_argument('--seed', type=int, default=1)
    a = ap.parse_args()
    load = lambda path: json.load(open(path)) if path else None
    out = estimate(load(a.dataset), load(getattr(a, 'class')), load(a.seal), load(a.predict), a.replicates, a.seed)
    text = json.dumps(out, indent=1)
    if a.out:
        open(a.out, 'w').write(text + '\n')
    else:
        sys.stdout.write(text + '\n')


if __name__ == '__main__':
    main()
