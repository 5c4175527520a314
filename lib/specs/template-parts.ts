import type { SpecItem } from './document';
import { choice, inGroup, material, measure } from './template-items';

const setUp: [string, string] = ['hardware-setup', 'hardware-setup'];

/** Electronics, hardware, set-up and case of a solid six-string. Every value is common practice, there to be changed. */
export const partItems: SpecItem[] = [
  ...inGroup('electronics', [
    choice('pickup_neck', 'Neck pickup', ['humbucker, open', 'humbucker, covered', 'single coil', 'none'], setUp),
    choice('pickup_bridge', 'Bridge pickup', ['humbucker, open', 'humbucker, covered', 'single coil'], setUp),
    measure('pickup_neck_resistance', 'Neck pickup, resistance', ['7.6', 'kohm', '0.5'], setUp),
    measure('pickup_bridge_resistance', 'Bridge pickup, resistance', ['8.4', 'kohm', '0.5'], setUp),
    choice('controls', 'Controls', ['one volume, one tone', 'two volumes, two tones'], ['machining', 'hardware-setup']),
    choice('switch', 'Switch', ['three-way', 'three-way, coils split on the tone'], setUp),
  ]),
  ...inGroup('hardware', [
    choice('bridge', 'Bridge', ['fixed, through the body', 'tremolo, two posts'], ['machining', 'hardware-setup']),
    choice('tuners', 'Tuners', ['locking, 18 to 1', 'open gear'], ['machining', 'hardware-setup']),
    choice('hardware_colour', 'Colour of the hardware', ['black', 'nickel', 'gold'], setUp),
    choice('strap_buttons', 'Strap buttons', ['locking', 'plain'], setUp),
  ]),
  ...inGroup('strings', [
    measure('string_count', 'Strings', ['6', 'count'], ['machining', 'hardware-setup']),
    choice('tuning', 'Tuning', ['E2 A2 D3 G3 B3 E4'], setUp),
    choice('gauges', 'Gauges', ['10 13 17 26 36 46'], setUp),
    measure('tension_low', 'Lightest string pulls at least', ['14', 'lb'], setUp),
    measure('tension_high', 'Heaviest string pulls at most', ['21', 'lb'], setUp),
    measure('relief', 'Relief at the 7th fret', ['0.008', 'in', '0.002'], setUp),
    measure('action_treble', 'Action at the 12th fret, treble side', ['4', '64ths', '1'], setUp),
    measure('action_bass', 'Action at the 12th fret, bass side', ['5', '64ths', '1'], setUp),
    measure('pickup_neck_treble', 'Pickup height, neck, treble side', ['11', '64ths', '1'], setUp),
    measure('pickup_bridge_treble', 'Pickup height, bridge, treble side', ['9', '64ths', '1'], setUp),
  ]),
  ...inGroup('case', [
    choice('case', 'Case', ['hard case, house', 'padded bag, house'], ['final-check', 'final-check']),
    material('strap', 'Strap', ['cow_leather', '2 in, black'], ['final-check', 'final-check']),
    choice(
      'papers',
      'Papers in the case',
      ['as-built sheet, set-up sheet, certificate'],
      ['final-check', 'final-check'],
    ),
  ]),
];
