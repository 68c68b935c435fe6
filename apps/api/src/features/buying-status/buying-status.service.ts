import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { BuyingLineResponse, recordDeliveryRequest } from '@trammel/shared/buying-status';
import { appendAudit } from '../../database/append-audit.ts';
import { Delivery } from '../../database/entities/delivery.entity.ts';
import { SupplyLine } from '../../database/entities/supply-line.entity.ts';
import { readStatement } from '../../database/raw.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, NotFound } from '../../http/problems.ts';
import { buyingVerdictOf } from './buying-verdict.ts';
import { findLine } from './buying-status.queries.ts';

const shownDeliveries = 100;

/** One line with what was delivered and decided; status only, no measured value. */
export async function readLine(deed: Deed, lineId: string): Promise<BuyingLineResponse> {
  const line = findLine(deed.reader, deed.actor.organisationId, lineId, deed.now);
  if (!line) throw new NotFound();
  const deliveries = await deed.reader.getRepository(Delivery).find({
    where: { supplyLineId: lineId },
    order: { recordedAt: 'DESC', id: 'DESC' },
    take: shownDeliveries,
  });
  return {
    line,
    conditions: readStatement(
      deed.reader,
      `SELECT k.text, k.owner, k.due_on AS dueOn, k.state FROM interim_conditions k
       JOIN supply_lines l ON l.decided_submission_id = k.submission_id WHERE l.id = ? ORDER BY k.due_on, k.id`,
    ).all(lineId) as BuyingLineResponse['conditions'],
    deliveries: deliveries.map(({ id, quantity, note, recordedByName, recordedAt }) => ({
      id,
      quantity,
      note,
      recordedBy: recordedByName,
      recordedAt,
    })),
    history: readStatement(
      deed.reader,
      `SELECT d.decided_at AS at, s.revision_code AS revision, d.outcome, d.end_on AS until, d.piece_limit AS pieceLimit,
         d.decided_by_name AS decidedBy
       FROM dispositions d JOIN submissions s ON s.id = d.submission_id
       JOIN supply_lines l ON l.part_id = s.part_id AND l.supplier_id = s.supplier_id WHERE l.id = ? ORDER BY d.decided_at DESC LIMIT 100`,
    ).all(lineId) as BuyingLineResponse['history'],
    abilities: { recordDelivery: deed.actor.permissions.has('delivery:record') },
  };
}

/** Counts pieces received against the limit of an interim approval or a deviation. */
export function recordDelivery(
  deed: Deed,
  lineId: string,
  command: z.output<typeof recordDeliveryRequest>,
): Promise<{ id: string; piecesLeft: number | null }> {
  return deed.transact(async (manager) => {
    const line = await manager.findOneBy(SupplyLine, { id: lineId, customerId: deed.actor.organisationId });
    if (!line) throw new NotFound();
    if (buyingVerdictOf(line, deed.now.slice(0, 10)) === 'hold') {
      throw new Conflict(
        'This part is on hold from this supplier. Nothing may be received until a new decision.',
      );
    }
    const left = line.pieceLimit === null ? null : line.pieceLimit - line.piecesUsed;
    if (left !== null && command.quantity > left) {
      throw new Conflict(
        `Only ${left} pieces are left of ${line.pieceLimit ?? 0}. Receive at most that many, or ask for a new decision.`,
      );
    }
    const delivery = {
      id: randomUUID(),
      supplyLineId: line.id,
      ...command,
      recordedById: deed.actor.userId,
      recordedByName: deed.actor.name,
      recordedAt: deed.now,
    };
    await manager.insert(Delivery, delivery);
    const piecesUsed = line.piecesUsed + command.quantity;
    await manager.update(SupplyLine, { id: line.id }, { piecesUsed, updatedAt: deed.now });
    appendAudit(manager, deed, {
      action: 'delivery.recorded',
      objectType: 'supply-line',
      objectId: line.id,
      summary: `${command.quantity} pieces of ${line.partNumber} received`,
      before: { piecesUsed: line.piecesUsed },
      after: { piecesUsed, ...command },
    });
    return { id: delivery.id, piecesLeft: left === null ? null : left - command.quantity };
  });
}
