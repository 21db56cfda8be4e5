export interface ErrorWords { title: string, text: string, again: boolean }

/** What a page that could not be shown says instead, by HTTP status. */
export function wordsForError(status: number | undefined): ErrorWords {
  switch (status) {
    case 401: return { title: 'Please sign in', text: 'This page is for people who are signed in.', again: false }
    case 403: return { title: 'This is not open to you', text: 'Your account may not see this page. The owner of the account can change that.', again: false }
    case 404: return { title: 'There is nothing at this address', text: 'It may have been moved or archived, or it is not yours to see. Nothing is lost by coming here.', again: false }
    case 429: return { title: 'That was many tries', text: 'Wait a minute, then try again.', again: true }
    case 503: return { title: 'Lathkey is not available just now', text: 'We cannot reach our own records. What was saved is safe. Try again in a minute.', again: true }
    default: return { title: 'Something went wrong on our side', text: 'Nothing you saved is lost. Try again, and if it stays like this tell the person who runs this program.', again: true }
  }
}
