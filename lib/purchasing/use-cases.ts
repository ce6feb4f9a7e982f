/** Every use case of this area; lib/registry.ts joins the areas for the API description and the authorisation matrix. */
import type { UseCase } from '@/lib/api/use-case';
import { approveOrder, returnOrderToDraft, submitOrder } from './approve-order';
import { cancelOrder, settleShortOrder } from './cancel-order';
import { changeOrderLines, createOrder } from './draft-order';
import { getOrder, listOrders } from './get-order';
import { orderShortfalls } from './order-shortfalls';
import { closeOrder, giveUpPayment, payOrder } from './pay-order';
import { orderAsCsv, orderAsPdf, sendOrder } from './send-order';
import { listShortfalls } from './shortfalls';
import { changeSupplier, createSupplier, listOffers, listSuppliers, setOffer } from './suppliers';

export const purchasingUseCases: readonly UseCase[] = [
  listShortfalls,
  orderShortfalls,
  createOrder,
  listOrders,
  getOrder,
  changeOrderLines,
  submitOrder,
  approveOrder,
  returnOrderToDraft,
  payOrder,
  giveUpPayment,
  sendOrder,
  settleShortOrder,
  cancelOrder,
  closeOrder,
  orderAsPdf,
  orderAsCsv,
  listSuppliers,
  createSupplier,
  changeSupplier,
  listOffers,
  setOffer,
];
