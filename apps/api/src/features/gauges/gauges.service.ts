import { randomUUID } from 'node:crypto';
import type { gaugeRequest, GaugeResponse } from '@trammel/shared/gauges';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import { Gauge } from '../../database/entities/gauge.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { invalidField, NotFound } from '../../http/problems.ts';
import { updateVersioned } from '../../http/versions.ts';

type Saved = z.infer<typeof gaugeRequest>;

export function addGauge(deed: Deed, body: Saved): Promise<GaugeResponse> {
  return deed.transact(async (manager) => {
    const { organisationId } = deed.actor;
    await requireSound(manager, organisationId, body, null);
    const id = randomUUID();
    await manager.insert(Gauge, { ...body, id, organisationId, createdAt: deed.now });
    appendAudit(manager, deed, {
      action: 'gauge.added',
      objectType: 'gauge',
      objectId: id,
      summary: `Added gauge ${body.code}`,
      after: body,
    });
    return { ...body, id, version: 1 };
  });
}

export function changeGauge(
  deed: Deed,
  gaugeId: string,
  version: number,
  body: Saved,
): Promise<GaugeResponse> {
  return deed.transact(async (manager) => {
    const { organisationId } = deed.actor;
    const gauge = await manager.findOneBy(Gauge, { id: gaugeId, organisationId });
    if (!gauge) throw new NotFound();
    await requireSound(manager, organisationId, body, gaugeId);
    const next = await updateVersioned(manager, Gauge, { id: gaugeId, version }, body, presentGauge);
    appendAudit(manager, deed, {
      action: 'gauge.changed',
      objectType: 'gauge',
      objectId: gaugeId,
      summary: `Changed gauge ${body.code}`,
      before: presentGauge(gauge),
      after: body,
    });
    return { ...body, id: gaugeId, version: next };
  });
}

async function requireSound(
  manager: EntityManager,
  organisationId: string,
  body: Saved,
  gaugeId: string | null,
): Promise<void> {
  const same = await manager.findOneBy(Gauge, { organisationId, code: body.code });
  if (same && same.id !== gaugeId) throw invalidField('/code', `There is already a gauge ${body.code}.`);
  if (body.calibratedOn !== null && body.dueOn !== null && body.dueOn < body.calibratedOn) {
    throw invalidField('/dueOn', 'The next calibration cannot be due before the last one was made.');
  }
  if (body.resolution !== null && !/[1-9]/.test(body.resolution)) {
    throw invalidField('/resolution', 'A resolution is more than zero.');
  }
}

function presentGauge(gauge: Gauge): GaugeResponse {
  const { id, code, kind, resolution, unit, calibratedOn, dueOn, certificate, version } = gauge;
  return { id, code, kind, resolution, unit, calibratedOn, dueOn, certificate, version };
}
