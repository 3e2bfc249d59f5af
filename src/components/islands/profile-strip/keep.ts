import { ApiProblem, call, NoAnswer } from '~/lib/client/api';
import { profileRoutes, versionSchema, type Version } from '~/lib/contracts/profiles';
import { Autosave, SaveRejection } from './autosave';
import { sameContent, sameDocument, type ProfileDocument } from './document';

/** Where the document is kept on the server, and at which revisions. */
export interface Kept {
  readonly profileId: string;
  readonly profileRevision: number;
  readonly version: Version;
  readonly document: ProfileDocument;
}

/** What someone else saved in the meantime. */
export interface Theirs {
  readonly profileRevision: number;
  readonly version: Version;
  readonly document: ProfileDocument;
}

const documentOf = (name: string, version: Version): ProfileDocument => ({
  name,
  kilnId: version.kilnId,
  profile: version.profile,
  load: version.load,
});

export const keptOf = (profile: { id: string; name: string; revision: number }, version: Version): Kept => ({
  profileId: profile.id,
  profileRevision: profile.revision,
  version,
  document: documentOf(profile.name, version),
});

/** Asks for what now stands on the server, to be set beside one's own. */
async function theirsOf(kept: Kept, found: unknown): Promise<Theirs> {
  const params = { id: kept.profileId, n: String(kept.version.number) };
  const profile = await call(profileRoutes.get, { params: { id: kept.profileId } });
  const given = versionSchema.safeParse(found);
  const version = given.success ? given.data : await call(profileRoutes.getVersion, { params });
  return { profileRevision: profile.revision, version, document: documentOf(profile.name, version) };
}

async function update(kept: Kept, document: ProfileDocument): Promise<Kept> {
  let next = kept;
  const params = { id: kept.profileId, n: String(kept.version.number) };
  if (!sameContent(kept.document, document)) {
    const { kilnId, profile, load } = document;
    const version = await call(profileRoutes.putVersion, {
      params,
      revision: kept.version.revision,
      body: { kilnId, profile, load },
    });
    next = { ...next, version, document: { ...document, name: kept.document.name } };
  }
  // A name being retyped may be empty for a moment: the old one stands until there is another.
  if (document.name.trim() !== '' && kept.document.name !== document.name) {
    const renamed = await call(profileRoutes.update, {
      params: { id: kept.profileId },
      revision: next.profileRevision,
      body: { name: document.name },
    });
    next = { ...next, profileRevision: renamed.revision, document };
  }
  return next;
}

/**
 * Sends what changed: the draft's content at its revision, the profile's name at its own.
 *
 * @throws {SaveRejection} that says what helps: waiting, a person's decision, or another document
 */
export async function keep(kept: Kept, document: ProfileDocument): Promise<Kept> {
  try {
    return await update(kept, document);
  } catch (error) {
    throw await rejectionOf(error, kept);
  }
}

async function rejectionOf(error: unknown, kept: Kept): Promise<SaveRejection> {
  if (error instanceof NoAnswer) return new SaveRejection({ kind: 'away', message: error.message });
  if (!(error instanceof ApiProblem)) throw error;
  if (error.status === 412) {
    try {
      return new SaveRejection({ kind: 'conflict', theirs: await theirsOf(kept, error.problem.current) });
    } catch (again) {
      if (again instanceof NoAnswer || again instanceof ApiProblem)
        return new SaveRejection({ kind: 'away', message: again.message });
      throw again;
    }
  }
  if (error.status === 401)
    return new SaveRejection({
      kind: 'refused',
      message: 'You are signed out. Sign in again in another tab, then retry here; nothing is lost.',
    });
  if (error.status >= 500 || error.status === 429)
    return new SaveRejection({ kind: 'away', message: error.message });
  return new SaveRejection({ kind: 'refused', message: error.message });
}

/** A document on its way to the server: where it is kept there, and what of it is not kept yet. */
export class Keeper {
  readonly autosave: Autosave<ProfileDocument>;

  constructor(public kept: Kept) {
    this.autosave = new Autosave(kept.document, {
      isSame: sameDocument,
      now: Date.now,
      save: async (sent) => this.adopt(await keep(this.kept, sent)),
    });
  }

  /** The version was changed by a call of its own: submitted, approved. */
  adopt(kept: Kept): void {
    this.kept = kept;
  }

  /** Two differ: the chosen one stands, and what is on the server is known again. */
  settle(theirs: Theirs, current: ProfileDocument): void {
    this.adopt({ ...theirs, profileId: this.kept.profileId });
    this.autosave.settle(theirs.document, current);
  }
}
