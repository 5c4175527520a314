/** A tuning and a set that is common for so many strings. Common practice, there to be changed. */
type UsualSet = { tuning: string; gauges: string };

const usualSets: Readonly<Record<number, UsualSet>> = {
  4: { tuning: 'E1 A1 D2 G2', gauges: '45 65 80 105' },
  5: { tuning: 'B0 E1 A1 D2 G2', gauges: '45 65 80 105 130' },
  6: { tuning: 'E2 A2 D3 G3 B3 E4', gauges: '10 13 17 26 36 46' },
  7: { tuning: 'B1 E2 A2 D3 G3 B3 E4', gauges: '10 13 17 26 36 46 60' },
  8: { tuning: 'F#1 B1 E2 A2 D3 G3 B3 E4', gauges: '9 11 16 24w 34 46 60 80' },
};

/** What so many strings usually are, or null. */
export const usualSet = (strings: number): UsualSet | null => usualSets[strings] ?? null;
