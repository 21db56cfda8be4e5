import type { Db } from '../connect'
import type { PaperSize } from '../../../shared/types/paper'
import { keepClearText, momentWords } from '../../../shared/utils/messages/keepClearMessages'
import { appUrl } from '../../utils/appUrl'
import { now } from '../../utils/clock'
import type { KeepClear } from '../../utils/papers/keepClear'
import type { Actor } from './actor'
import { findNoticeView } from './notices'
import { findPaperReader } from './paperReader'

export async function readKeepClear(db: Db, actor: Actor, noticeId: string, asked?: PaperSize): Promise<KeepClear> {
  const [notice, { size }] = await Promise.all([findNoticeView(db, actor, noticeId), findPaperReader(db, actor, asked)])
  const told = (instant: string) => momentWords(instant, notice.timeZone)
  return {
    size, home: `${notice.propertyName}, ${notice.unitName}`, roomName: notice.roomName, url: appUrl(`/notices/${notice.id}`), madeAt: now(),
    text: keepClearText(notice, notice.contact, told(notice.raisedAt)),
    lifted: notice.liftedAt ? { at: told(notice.liftedAt), reason: notice.liftedReason ?? '', by: notice.liftedByName ?? '' } : null,
  }
}
