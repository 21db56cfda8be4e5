import type { Db } from '../connect'
import type { PaperSize } from '../../../shared/types/paper'
import { hatchCardText } from '../../../shared/utils/messages/hatchCardMessages'
import { hatchCardFacts } from '../../../shared/utils/papers/hatchCard'
import { appUrl } from '../../utils/appUrl'
import { now } from '../../utils/clock'
import type { HatchCard } from '../../utils/papers/hatchCard'
import type { Actor } from './actor'
import { findPaperReader } from './paperReader'
import { readAttic } from './readAttic'

/** An attic's hatch card as it stands now, in the asker's units. */
export async function readHatchCard(db: Db, actor: Actor, attic: Parameters<typeof readAttic>[1], asked?: PaperSize): Promise<HatchCard> {
  const [detail, { system, contact, size }] = await Promise.all([readAttic(db, attic), findPaperReader(db, actor, asked)])
  return {
    size, attic: detail.attic.name, home: `${detail.property.name}, ${detail.unit.name}`, url: appUrl(`/attics/${detail.attic.id}`),
    text: hatchCardText(hatchCardFacts(detail, system), contact, system, detail.today), madeAt: now(),
  }
}
