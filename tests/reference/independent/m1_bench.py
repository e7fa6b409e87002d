"""Figures read out on bench circuits and on sealed circuits."""
import numpy as np

import m1_figures as fig
from m1_design import determined
from m1_quantum import embed, ideal_unitary, transfer_matrix
from m1_register import Joint


def class_labels(dataset, gate_class):
    """Bench circuits of the class in the labels of the dataset: gates are matched by targets and transfer matrix."""
    def matrix(g):
        order = sorted(g['targets'])
        n = len(order)
        return tuple(order), transfer_matrix([embed(ideal_unitary(g['ideal']), [order.index(t) for t in g['targets']], n)], n)

    own = [(g['label'], *matrix(g)) for g in dataset['gates']]
    name = {}
    for g in gate_class['gates']:
        t, m = matrix(g)
        name[g['label']] = next(label for label, t2, m2 in own if t == t2 and np.max(np.abs(m - m2)) < 1e-9)
    return [{'depth': b['depth'], 'circuits': [{**c, 'gates': [name[g] for g in c['gates']]} for c in b['circuits']]}
            for b in gate_class['bench']]


def bench_figures(bench, ctx):
    out = []
    # Without a class there are no bench circuits, but the empty circuit and with it the readout loss are always there.
    for level in bench or [{'depth': 0, 'circuits': [{'id': 'empty', 'qubits': ctx['register'], 'gates': []}]}]:
        circuits, depth, pr = level['circuits'], level['depth'], ctx['predictor']
        stack = lambda f: np.stack([f(c) for c in circuits], axis=-2)
        p = stack(pr.ideal)
        known = [pr.determined(c) for c in circuits]
        if isinstance(pr, Joint):
            d = p.shape[-1]
            row = sum(pr.signal_row(c, p[i] - 1 / d) for i, c in enumerate(circuits))
            signal_known = bool(determined(pr.patch.inverse, row)[0]) and not pr.patch.too_weak
        else:
            signal_known = all(known)
        more = dict(extrapolated=depth > 2 * ctx['longest'], firstOrderOnly=ctx['first_order_only'])
        need = signal_known or all(known)
        hat = stack(lambda c: pr.predict(ctx['model'], c)) if need else None
        hat_b = stack(lambda c: pr.predict(ctx['model_b'], c)) if need else None
        hat_1 = stack(lambda c: pr.predict(ctx['first'], c)) if need else None
        for key, ok, f, kind in (('retained-signal', signal_known, lambda q: fig.retained_signal(p, q), 'percentile'),
                                 ('output-error', all(known), lambda q: fig.total_variation(p, q), 'reflected')):
            common = dict(qubits=ctx['register'], B=ctx['B'], depth=depth)
            if not ok:
                n = sum(not k for k in known)
                out.append(ctx['figure'](key, None, None, reason=f'{n} of {len(known)} bench circuits not determined', **common, **more))
                continue
            out.append(ctx['figure'](key, f(hat), f(hat_b), first=f(hat_1), kind=kind, **common, **more))
        if depth == 0:
            signal = dict(out[-2])
            signal.update(key='readout-loss', depth=None)
            if signal['value'] is not None:
                signal['value'], signal['firstOrder'] = 1 - signal['value'], 1 - signal['firstOrder']
                signal['intervals'] = [{'level': i['level'], 'low': 1 - i['high'], 'high': 1 - i['low']} for i in signal['intervals']]
            out.append(signal)
    out = out if bench else [f for f in out if f['key'] == 'readout-loss']
    for f in out if ctx['misfit_out'] else []:
        f['intervals'] = None
    return out


def sealed_figures(dataset, sealed, ctx):
    """Prediction error and sealed check: the sealed circuits of the patch (joint) or of the whole register (chained)."""
    pr, wanted = ctx['predictor'], set(ctx['register'])
    chosen = [(p['qubits'], c) for p in dataset['patches'] if set(p['qubits']) == wanted for c in p['circuits'] if c['id'] in sealed]
    if not chosen:
        return [], None
    circuits = [{'qubits': q, 'gates': c['gates'], 'id': c['id']} for q, c in chosen]
    known = [pr.determined(c) for c in circuits]
    common = dict(qubits=ctx['register'], B=ctx['B'], firstOrderOnly=ctx['first_order_only'])
    if not all(known):
        n = sum(not k for k in known)
        return [ctx['figure']('prediction-error', None, None, reason=f'{n} of {len(known)} sealed circuits not determined', **common)], None
    n = len(ctx['register'])
    keys = [format(o, 'b').zfill(n) for o in range(2 ** n)]
    counts = np.array([[c['counts'].get(k, 0) for k in keys] for _, c in chosen], float)
    shots = np.array([c['shots'] for _, c in chosen], float)
    stack = lambda f: np.stack([f(c) for c in circuits], axis=-2)
    hat, hat_b = stack(lambda c: pr.predict(ctx['model'], c)), stack(lambda c: pr.predict(ctx['model_b'], c))
    check = fig.sealed_check(stack(pr.ideal), hat, hat_b, counts, shots, ctx['rng'])
    observed = counts / shots[:, None]
    first = fig.total_variation(stack(lambda c: pr.predict(ctx['first'], c)), observed)
    out = ctx['figure']('prediction-error', check['value'], fig.total_variation(hat_b, observed), first=first, kind='reflected', **common)
    if ctx['misfit_out']:
        out['intervals'] = None
    return [out], check
