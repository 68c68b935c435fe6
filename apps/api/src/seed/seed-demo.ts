import type { Core } from '../http/core.ts';
import type { FileStore } from '../storage/file-store.ts';
import { withdrawRequest } from '../features/requests/request-steps.service.ts';
import { presentRequest } from '../features/requests/requests.presenter.ts';
import { seedCast } from './cast.ts';
import { usualElements } from './elements.ts';
import { shaft } from './parts/shaft.ts';
import { seedPart, seedRequest, type Seeding } from './steps.ts';
import { bracketStory } from './stories/bracket-story.ts';
import { coverStory, endCapStory } from './stories/cover-story.ts';
import { manifoldStory } from './stories/manifold-story.ts';
import { shaftStory } from './stories/shaft-story.ts';

/** Fills an empty database with the demo, through the same services that serve people. False when there is data already. */
export async function seedDemo(core: Core, store: FileStore): Promise<boolean> {
  const [found]: { count: number }[] = await core.db.reader.query(
    'SELECT count(*) AS count FROM organisations',
  );
  if ((found?.count ?? 0) > 0) return false;
  const seeding: Seeding = { core, store, cast: await seedCast(core) };
  await manifoldStory(seeding);
  await endCapStory(seeding);
  await coverStory(seeding);
  await shaftStory(seeding);
  await bracketStory(seeding);
  await smallRequests(seeding);
  return true;
}

/** A request that was withdrawn, and one that nobody has acknowledged yet. */
async function smallRequests(seeding: Seeding): Promise<void> {
  const { core, cast } = seeding;
  const spare = { ...shaft, number: 'TD-20418', name: 'Output shaft, long', revision: 'A' };
  const part = await seedPart(seeding, spare, -30);
  const asked = {
    revisionId: part.revisionId,
    reason: 'initial' as const,
    streamKind: 'spindle' as const,
    streams: ['spindle 1', 'spindle 2'],
    pieces: 3,
    elements: usualElements(['design-record', 'control-plan', 'material-performance-results']),
    message: '',
  };
  const withdrawn = await seedRequest(seeding, {
    ...asked,
    supplier: 'vesperholt',
    issuedOn: -14,
    dueOn: 30,
  });
  const deed = cast.deed('Ines Carrow', -13);
  const request = await presentRequest(core.db.reader.manager, deed.actor, withdrawn.requestId);
  await withdrawRequest(
    deed,
    withdrawn.requestId,
    request.version,
    'The long shaft goes to a turning shop; a casting supplier was asked by mistake.',
  );
  await seedRequest(seeding, {
    ...asked,
    supplier: 'quillmark',
    issuedOn: -2,
    dueOn: 21,
    message: 'Same seats as the short shaft; the length is new.',
  });
}
