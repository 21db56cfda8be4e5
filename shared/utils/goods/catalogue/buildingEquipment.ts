import { MEMORY, row } from './catalogueRow'

export const BUILDING_EQUIPMENT = [
  row('water-heater-40-gal-empty', 'Water heater 40 gal, empty', 'building-equipment', [100, 125, 150], 20.0, 'trade page', 'medium'),
  row('water-heater-40-gal-full', 'Water heater 40 gal, full', 'building-equipment', [430, 460, 485], 20.0, 'trade page; water 40 × 8.34 = 334 lb', 'high', { note: 'dead load on framing, not storage' }),
  row('water-heater-50-gal-full', 'Water heater 50 gal, full', 'building-equipment', [547, 567, 600], 25.0, 'trade pages for 130–170 lb empty; water 50 × 8.34 = 417 lb', 'high'),
  row('water-heater-80-gal-full', 'Water heater 80 gal, full', 'building-equipment', [837, 855, 900], 40.0, 'trade pages for 170–230 lb empty; water 80 × 8.34 = 667 lb', 'medium'),
  row('air-handler-or-attic-furnace', 'Air handler or attic furnace', 'building-equipment', [100, 150, 220], 20.0, MEMORY, 'low'),
  row('drain-pan-30-x-60-x-2-in-full-of-water', 'Drain pan 30 × 60 × 2 in, full of water', 'building-equipment', [120, 130, 135], 2.1, 'computed: 2.083 ft³ × 62.4 lb/ft³ = 130 lb', 'medium'),
  row('flexible-duct-8-in-25-ft', 'Flexible duct 8 in, 25 ft', 'building-equipment', [10, 15, 22], 12.0, MEMORY, 'low'),
  row('blown-cellulose-r-38-per-ft2', 'Blown cellulose R-38, per ft²', 'building-equipment', [1.2, 1.5, 2.0], 0.9, 'settled density 1.5–2.3 lb/ft³ (board maker and trade pages) × 10–12 in', 'medium', { note: 'compare with the weight the ceiling board may carry', per: 'square-foot' }),
  row('blown-fiberglass-r-38-per-ft2', 'Blown fiberglass R-38, per ft²', 'building-equipment', [0.5, 0.8, 1.2], 1.2, MEMORY, 'low', { per: 'square-foot' }),
] as const
