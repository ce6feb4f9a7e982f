/** Every use case of this area; lib/registry.ts joins the areas for the API description and the authorisation matrix. */
import type { UseCase } from '@/lib/api/use-case';
import { createCabinet, listBins, listCabinets, retireBin } from './bins';
import { abandonCount, enterCounts, openCount, recountEntries } from './count-bins';
import { createBatch } from './create-batch';
import { findAnything } from './find-anything';
import { cancelBatch, finishBatch } from './finish-batch';
import { moveStock, openingStock, scrapStock } from './move-stock';
import { changePart, createPart, getPart, listParts } from './parts';
import { missingAtPick, pickBatch } from './pick-batch';
import { postCount } from './post-count';
import { getBatch, listBatches, pickList } from './read-batches';
import { getCount, listCounts } from './read-counts';
import { listLots, listMovements } from './read-ledger';
import { listReceipts, receiptProposal } from './read-receipts';
import { receiveDelivery } from './receive-delivery';
import { reserveBatch } from './reserve-batch';

export const storesUseCases: readonly UseCase[] = [
  findAnything,
  listParts,
  getPart,
  createPart,
  changePart,
  listCabinets,
  createCabinet,
  listBins,
  retireBin,
  listLots,
  listMovements,
  moveStock,
  scrapStock,
  openingStock,
  listBatches,
  createBatch,
  getBatch,
  reserveBatch,
  pickList,
  pickBatch,
  missingAtPick,
  finishBatch,
  cancelBatch,
  receiptProposal,
  listReceipts,
  receiveDelivery,
  listCounts,
  openCount,
  getCount,
  enterCounts,
  recountEntries,
  postCount,
  abandonCount,
];
