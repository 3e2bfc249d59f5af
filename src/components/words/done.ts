/** What a page says after a redirect, by the code in `?done=`. */
export const DONE = {
  saved: 'Saved.',
  added: 'Added.',
  archived: 'Archived. It can be brought back from the archive.',
  'brought-back': 'Brought back from the archive.',
  duplicated: 'A copy was made. It is a draft of yours.',
  'new-draft': 'A new draft was begun from that version.',
  'new-profile': 'The profile was begun. Its first version is a draft.',
  planned: 'The run is planned.',
  started: 'The firing has started. The version and the load are now fixed.',
  finished: 'Heating is over. The kiln cools down.',
  'broken-off': 'The run was broken off.',
  signed: 'Signed. The run is closed.',
  'handed-out': 'Handed out. Those it is for see it now.',
  withdrawn: 'Withdrawn. Those it was for see that it is.',
  acknowledged: 'Noted that you read the cautions.',
  submitted: 'Submitted for review.',
  approved: 'Approved and sealed. This version never changes.',
  returned: 'Returned to its author with your remarks.',
  retired: 'Retired.',
  'password-changed': 'The password was changed. Other sessions have ended.',
  'session-ended': 'That session has ended.',
  'signed-out': 'You are signed out.',
} as const;
export type DoneCode = keyof typeof DONE;

/** A path with its sentence: `withDone('/kilns', 'added')`. */
export const withDone = (path: string, code: DoneCode): string =>
  `${path}${path.includes('?') ? '&' : '?'}done=${code}`;
