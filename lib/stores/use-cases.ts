/** Every use case of this area; lib/registry.ts joins the areas for the API description and the authorisation matrix. */
import type { UseCase } from '@/lib/api/use-case';
import { completeKit } from './complete-kit';
import { createBins } from './create-bins';
import { getBin } from './get-bin';
import { retirePart } from './retire-part';
import { createCabinet } from './create-cabinet';
import { listBins } from './list-bins';
import { listCabinets } from './list-cabinets';
import { retireBin } from './retire-bin';
import { abandonCount } from './abandon-count';
import { enterCounts } from './enter-counts';
import { openCount } from './open-count';
import { recountEntries } from './recount-entries';
import { createBatch } from './create-batch';
import { findAnything } from './find-anything';
import { cancelBatch } from './cancel-batch';
import { finishBatch } from './finish-batch';
import { moveStock } from './move-stock';
import { openingStock } from './opening-stock';
import { scrapStock } from './scrap-stock';
import { changePart } from './change-part';
import { createPart } from './create-part';
import { getPart } from './get-part';
import { listParts } from './list-parts';
import { missingAtPick } from './missing-at-pick';
import { pickBatch } from './pick-batch';
import { postCount } from './post-count';
import { getBatch } from './get-batch';
import { listBatches } from './list-batches';
import { pickList } from './pick-list';
import { getCount } from './get-count';
import { listCounts } from './list-counts';
import { listLots } from './list-lots';
import { listMovements } from './list-movements';
import { listReceipts } from './list-receipts';
import { receiptProposal } from './receipt-proposal';
import { receiveDelivery } from './receive-delivery';
import { reserveBatch } from './reserve-batch';

export const storesUseCases: readonly UseCase[] = [
  findAnything,
  listParts,
  getPart,
  createPart,
  changePart,
  retirePart,
  listCabinets,
  createCabinet,
  listBins,
  getBin,
  createBins,
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
  completeKit,
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
