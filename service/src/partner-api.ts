import express, { type Router } from 'express';
import type { operations } from '../../openapi/types/partner';
import type { Services } from './compose';
import { mountPartnerEstimates } from './estimates/partner-router';
import { ContractRoutes } from './http/contract-routes';
import { noSuchAddress } from './http/problem-details';
import { noStore, openToOtherOrigins } from './http/security-headers';
import { answerListedOrigins, requireListedOrigin } from './keys/cross-origin';
import { keyGuard } from './keys/key-guard';
import { limitPerKey, limitPerVisitor, limitRefusals } from './keys/key-limits';
import { recogniseKey } from './keys/key-passport';

/** What partners call: `/v1`. The order is the point: who asks, from where, how often, and only then what. */
export function createPartnerApi(services: Services): Router {
  const { keys, log, config } = services;
  const routes = new ContractRoutes<operations>(services.partnerContract, {
    guard: keyGuard,
    validateAnswers: services.validateAnswers,
  });
  mountPartnerEstimates(routes, { published: services.publishedEstimators, estimates: services.estimates });
  routes.requireComplete();
  routes.refuseOtherMethods();

  const router = express.Router();
  router.use(noStore, openToOtherOrigins, answerListedOrigins({ keys, log }));
  router.use(
    limitRefusals(recogniseKey(keys)),
    requireListedOrigin({ keys, log, publicUrl: config.publicUrl }),
    limitPerKey(),
    limitPerVisitor(),
  );
  router.use(express.json({ limit: '1mb' }), routes.router, noSuchAddress);
  return router;
}
