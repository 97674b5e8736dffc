"""Reads a bundle from docs/spec/bundle.md alone, in Python's standard library: chain, leaves, commitments, seeds, draws.

    python3 reread.py BUNDLE.zip

Prints what it counted as JSON; ends with status 1 at the first thing that does not agree.
"""
import hashlib
import hmac
import json
import sys
import zipfile

TRUTHS = {
    'abx': ['A', 'B'],
    'triangle': ['AAB', 'ABA', 'BAA', 'BBA', 'BAB', 'ABB'],
    'duo-trio': ['AAB', 'ABA', 'BBA', 'BAB'],
    'same-different': ['AA', 'BB', 'AB', 'BA'],
    'directional-comparison': ['first', 'second'],
    'paired-preference': ['first', 'second'],
}

# Methods whose separate specimens are dealt in several ways, and in how many.
DEALS = {'triangle': 4}


def canon(value):
    return json.dumps(value, sort_keys=True, separators=(',', ':'), ensure_ascii=False).encode()


def digest(domain, *parts):
    return hashlib.sha256(domain.encode() + b'\0' + b''.join(parts)).hexdigest()


def agree(what, computed, recorded):
    if computed != recorded:
        sys.exit(f'{what}: computed {computed}, recorded {recorded}')


def fair_number(seed, label, below):
    limit = 256 - 256 % below
    counter = 0
    while True:
        block = hmac.new(bytes.fromhex(seed), label.encode() + counter.to_bytes(4, 'big'), 'sha256').digest()
        for byte in block:
            if byte < limit:
                return byte % below
        counter += 1


archive = zipfile.ZipFile(sys.argv[1])
study = json.loads(archive.read('study.json'))
later = json.loads(archive.read('later.json'))
entries = study['record'] + later

previous = '0' * 64
for number, entry in enumerate(entries, 1):
    agree('sequence', entry['sequence'], number)
    agree(f'link of entry {number}', entry['previous'], previous)
    content = {name: value for name, value in entry.items() if name != 'digest'}
    previous = digest('fairlead/entry/1', canon(content))
    agree(f'entry {number}', previous, entry['digest'])


def payloads(kind):
    return [entry['payload'] for entry in entries if entry['kind'] == kind]


sealed = [entry for entry in entries if entry['kind'] in ('protocol-sealed', 'protocol-amended')][-1]
agree('protocol', digest('fairlead/protocol/1', canon(study['protocol'])), sealed['payload']['digest'])
published = payloads('study-published')[0]
agree('document', hashlib.sha256(archive.read('study.json')).hexdigest(), published['digest'])

key = study['secrets']['codeKey']
agree('code key', digest('fairlead/code-key/1', bytes.fromhex(key['salt']), canon(key['rows'])),
      payloads('code-key-committed')[-1]['commitment'])

ids = {payload['session']: payload['sessionId'] for payload in payloads('session-planned')}
answers = {(one['session'], one['trial'], one['seat']): one for one in study['answers']}
leaves = 0
for lock in payloads('trial-locked'):
    for leaf in lock['leaves']:
        answer = answers.pop((ids[lock['session']], lock['trial'], leaf['seat']))
        salt = bytes.fromhex(answer.pop('salt'))
        agree('leaf', digest('fairlead/answer/1', salt, canon(answer)), leaf['leaf'])
        leaves += 1
agree('answers without a leaf', len(answers), 0)

requests = {(one['session'], one['trial'], one['presentation']): one for one in study.get('requests', [])}
for asked in payloads('presentation-requested'):
    request = requests.pop((ids[asked['session']], asked['trial'], asked['presentation']))
    salt = bytes.fromhex(request.pop('salt'))
    agree('leaf of a request', digest('fairlead/request/1', salt, canon(request)), asked['leaf'])
    leaves += 1
agree('requests without a leaf', len(requests), 0)

truths = 0
for secret in study['secrets']['draws']:
    number = secret['session']
    opened = [one for one in payloads('seating-opened') if one['session'] == number][0]
    agree('session secret', digest('fairlead/draw-secret/1', bytes.fromhex(secret['salt']),
                                   bytes.fromhex(secret['secret'])), opened['commitment'])
    fixed = [one for one in payloads('draw-fixed') if one['session'] == number]
    if not fixed:
        continue
    values = {one['seat']: one['value'] for one in payloads('contribution-revealed') if one['session'] == number}
    seated = {one['seat']: one['commitment'] for one in payloads('listener-joined') if one['session'] == number}
    for seat, value in values.items():
        agree('contribution', digest('fairlead/contribution/1', bytes.fromhex(value)), seated[seat])
    seed = digest('fairlead/draw-seed/1', bytes.fromhex(secret['secret']),
                  *[bytes.fromhex(values[seat]) for seat in fixed[0]['contributors']])
    plan = [one for one in payloads('session-planned') if one['session'] == number][0]['plan']
    names = TRUTHS[plan['method']]
    counts = [sum(row['cable'] == cable for row in key['rows']) for cable in (0, 1)]
    drawn = {
        'session': number,
        'firstSide': fair_number(seed, 'side', 2),
        'specimens': [fair_number(seed, f'specimen/{cable + 1}', counts[cable]) for cable in (0, 1)],
        'truths': [names[fair_number(seed, f'trial/{trial + 1}', len(names))]
                   for trial in range(plan['trials'] + plan['spares'])],
    }
    if plan.get('separateSpecimens'):
        places = list(range(min(counts)))
        first = places.pop(fair_number(seed, 'separate/first', len(places)))
        drawn['specimens'] = [first, first]
        drawn['separate'] = {'specimen': places[fair_number(seed, 'separate/other', len(places))]}
        if plan['method'] in DEALS:
            drawn['separate']['deals'] = [fair_number(seed, f'separate/trial/{trial + 1}', DEALS[plan['method']])
                                          for trial in range(plan['trials'] + plan['spares'])]
    if plan.get('checks'):
        steps, same = plan['checks']['steps'], plan['checks']['same']
        rows = [sum(row['cable'] == 2 + step for row in key['rows']) for step in range(len(steps))]
        kinds = ['main'] * (plan['trials'] - sum(steps) - same)
        kinds += [f'step/{step}' for step, trials in enumerate(steps) for _ in range(trials)] + ['same'] * same
        for last in range(len(kinds), 1, -1):
            chosen = fair_number(seed, f'kind/{last}', last)
            kinds[last - 1], kinds[chosen] = kinds[chosen], kinds[last - 1]
        drawn['kinds'] = kinds
        drawn['checkSpecimens'] = [fair_number(seed, f'check-specimen/{step + 1}', count) for step, count in enumerate(rows)]
    agree(f'draw of session {number}', drawn, [one for one in study['draws'] if one['session'] == number][0])
    truths += len(drawn['truths'])

print(json.dumps({'entries': len(entries), 'leaves': leaves, 'truths': truths, 'head': previous}))
