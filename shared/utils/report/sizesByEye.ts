/** What people have at hand to compare a size with. All ours, round figures: a reading by eye, and kept as one. */
export interface SizeByEye { value: number, label: string, us: string, metric: string }

export const SAGS_BY_EYE: readonly SizeByEye[] = [
  { value: 5, label: 'Hardly to be seen', us: 'about ¼ in', metric: 'about 5 mm' },
  { value: 12, label: 'A finger’s breadth', us: 'about ½ in', metric: 'about 12 mm' },
  { value: 25, label: 'Two fingers', us: 'about 1 in', metric: 'about 25 mm' },
  { value: 50, label: 'Three or four fingers', us: 'about 2 in', metric: 'about 50 mm' },
  { value: 100, label: 'A hand or more', us: 'about 4 in', metric: 'about 100 mm' },
]

export const STAINS_BY_EYE: readonly SizeByEye[] = [
  { value: 25, label: 'A coin', us: 'about 1 in', metric: 'about 25 mm' },
  { value: 100, label: 'The palm of a hand', us: 'about 4 in', metric: 'about 100 mm' },
  { value: 270, label: 'A dinner plate', us: 'about 11 in', metric: 'about 270 mm' },
  { value: 600, label: 'An arm’s length', us: 'about 2 ft', metric: 'about 600 mm' },
  { value: 1500, label: 'Larger still', us: 'about 5 ft', metric: 'about 1.5 m' },
]
