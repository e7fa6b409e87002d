"""Compare this reading with worked examples: check_examples.py DIR [NAME ...] prints the largest differences."""
import json
import sys
import time

from m1_independent import estimate

folder, names = sys.argv[1], sys.argv[2:]
for name in names:
    load = lambda kind: json.load(open(f'{folder}/{name}.{kind}.json'))
    want, t0 = load('expected'), time.time()
    got = estimate(load('dataset'), predict=load('circuits'), B=400)
    worst = {}
    note = lambda key, a, b: worst.__setitem__(key, max(worst.get(key, 0), abs(a - b)))
    first = got['patches'][0]
    for key in ('rank', 'columns', 'conditionRatio'):
        if key in want:
            note(key, first[key], want[key])
    for key, (rank, ratio) in want.get('soundAtIdeal', {}).items():
        p = next(p for p in got['patches'] if p['qubits'] == json.loads(key))
        note('soundAtIdeal', p['rank'], rank), note('soundAtIdeal', p['conditionRatio'], ratio)
    for f in got['figures']:
        if f['key'] == 'gate-loss' and f['gate'] in want.get('gateLoss', {}):
            note('gateLoss', f['value'], want['gateLoss'][f['gate']])
        if f['key'] == 'error-per-gate' and want.get('errorPerGate') is not None:
            note('errorPerGate', f['value'], want['errorPerGate'])
        for who in ('errorPerGate', f['gate']) if want.get('intervals') else ():
            if (f['key'], who) == ('error-per-gate', 'errorPerGate') or (f['key'] == 'gate-loss' and who in want['intervals'] and who == f['gate']):
                w = want['intervals'][who]
                note('SE ratio - 1', f['standardError'] / w['standardError'], 1)
                note('95 % end in SE', f['intervals'][2]['low'] / w['standardError'], w['low95'] / w['standardError'])
                note('95 % end in SE', f['intervals'][2]['high'] / w['standardError'], w['high95'] / w['standardError'])
    for p in got['predictions']:
        w = want['predictions'][p['id']]
        assert (w is None) == (p['probabilities'] is None), p
        for key, value in (w or {}).items():
            note('predictions', p['probabilities'][key], value)
    lost = [f['key'] for f in got['figures'] if f['value'] is None]
    print(name, {k: float(f'{v:.3g}') for k, v in worst.items()}, 'null:', sorted(set(lost)), want.get('notDetermined'),
          'settled', [p['settled'] for p in got['patches']], 'misfit', [round(p['misfit']['sigmas'], 2) for p in got['patches']], f'{time.time() - t0:.1f} s')
