import type { CharacteristicResponse } from '@trammel/shared/characteristics';
import type { Characteristic } from '../../database/entities/characteristic.entity.ts';

export function presentCharacteristic(row: Characteristic): CharacteristicResponse {
  return {
    id: row.id,
    revisionId: row.revisionId,
    sequence: row.sequence,
    balloon: row.balloon,
    sheet: row.sheet,
    zone: row.zone,
    description: row.description,
    kind: row.kind,
    tolerance: row.tolerance,
    geometric: row.geometric,
    unit: row.unit,
    decimals: row.decimals,
    class: row.class,
    method: row.method,
    attributeAllowed: row.attributeAllowed,
    pieces: row.pieces,
    controlledBy: row.controlledBy,
    note: row.note,
    nominal: row.nominal,
    lowerLimit: row.lowerLimit,
    upperLimit: row.upperLimit,
    naturalLower: row.naturalLower,
    explanation: row.explanation,
    version: row.version,
  };
}
