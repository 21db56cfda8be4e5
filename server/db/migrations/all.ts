import type { Migration } from 'kysely'
import * as people from './0001People'
import * as homes from './0002Homes'
import * as attics from './0003Attics'
import * as ceilings from './0004Ceilings'
import * as upkeep from './0005Upkeep'
import * as record from './0006Record'
import * as mailAttempts from './0007MailAttempts'
import * as judging from './0008Judging'
import * as invitationTerms from './0009InvitationTerms'
import * as lookedBefore from './0012LookedBefore'
import * as followedChanges from './0013FollowedChanges'
import * as signUps from './0014SignUps'
import * as strongbackOpinion from './0020StrongbackOpinion'
import * as codeBasis from './0022CodeBasis'
import * as inventory from './0024Inventory'
import * as keepClearNotices from './0027KeepClearNotices'
import * as paperReports from './0028PaperReports'
import * as hindsight from './0030Hindsight'
import * as unloadTrials from './0031UnloadTrials'
import * as markRepairs from './0032MarkRepairs'
import * as joinedMarks from './0033JoinedMarks'

/** A fixed list, so that the server bundle and the scripts share it. Never edit one that has run; add the next. */
export const migrations: Record<string, Migration> = {
  '0001People': people,
  '0002Homes': homes,
  '0003Attics': attics,
  '0004Ceilings': ceilings,
  '0005Upkeep': upkeep,
  '0006Record': record,
  '0007MailAttempts': mailAttempts,
  '0008Judging': judging,
  '0009InvitationTerms': invitationTerms,
  '0012LookedBefore': lookedBefore,
  '0013FollowedChanges': followedChanges,
  '0014SignUps': signUps,
  '0020StrongbackOpinion': strongbackOpinion,
  '0022CodeBasis': codeBasis,
  '0024Inventory': inventory,
  '0027KeepClearNotices': keepClearNotices,
  '0028PaperReports': paperReports,
  '0030Hindsight': hindsight,
  '0031UnloadTrials': unloadTrials,
  '0032MarkRepairs': markRepairs,
  '0033JoinedMarks': joinedMarks,
}
