import cookieParser from 'cookie-parser';
import express, { type Express } from 'express';
import type { operations } from '../../openapi/types/desk';
import type { Services } from './compose';
import { ContractRoutes } from './http/contract-routes';
import { csrfGuard, requireOwnSite } from './http/csrf-guard';
import { deskGuard } from './http/desk-guard';
import { documentation } from './http/documentation';
import { noSuchAddress, problemDetails } from './http/problem-details';
import { consoleProgram, widgetProgram } from './http/programs';
import { requestId } from './http/request-id';
import { requestLog } from './http/request-log';
import { noStore, securityHeaders } from './http/security-headers';
import { sessions } from './http/sessions';
import { mountDesk } from './desk/desk-router';
import { mountEditions } from './editions/editions-router';
import { mountEstimates } from './estimates/estimates-router';
import { mountEstimators } from './estimators/estimators-router';
import { mountFits } from './fits/fits-router';
import { mountKeys } from './keys/keys-router';
import { mountJournal } from './journal/journal-router';
import { mountSettings } from './settings/settings-router';
import { mountPartners } from './partners/partners-router';
import { createPartnerApi } from './partner-api';
import { mountPeople } from './people/people-router';
import { mountSession } from './people/session-router';
import { mountKeeping } from './records/keeping/keeping-router';
import { mendingAddresses, mendingBodies } from './records/mending/mending-bodies';
import { mountRecords } from './records/records-router';
import { sessionPassport } from './people/session-passport';

/** The whole service as one Express application; the caller listens. */
export function createApp(services: Services): Express {
  const { config } = services;
  const secure = config.publicUrl.startsWith('https:');
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', secure ? 1 : false);
  app.use(requestId, requestLog(services.log), securityHeaders({ secure }));
  app.use('/api', deskApi(services, secure));
  app.use('/v1', createPartnerApi(services));
  app.use('/docs', documentation([services.deskContract, services.partnerContract]));
  app.use('/widget', widgetProgram());
  app.use(consoleProgram());
  app.use(noSuchAddress, problemDetails(services.log));
  return app;
}

function deskApi(services: Services, secure: boolean): express.Router {
  const { config } = services;
  const csrf = csrfGuard(config.sessionSecret, secure);
  const passport = sessionPassport(services.signIns);
  const routes = new ContractRoutes<operations>(services.deskContract, {
    guard: deskGuard(csrf),
    validateAnswers: services.validateAnswers,
  });
  mountSession(routes, {
    passport,
    csrf,
    settings: services.settings,
    requireOwnSite: requireOwnSite(config.publicUrl),
  });
  mountEstimators(routes, services.estimators);
  mountRecords(routes, services);
  mountKeeping(routes, services);
  mountFits(routes, services.fits);
  mountEditions(routes, { editions: services.editions, review: services.editionReview });
  mountEstimates(routes, services.estimateTraces);
  mountKeys(routes, services.keys);
  mountPeople(routes, { people: services.peopleService, invitations: services.invitationService });
  mountJournal(routes, services.journalService);
  mountSettings(routes, services.settingsService);
  mountPartners(routes, { partners: services.partners, sites: services.sites });
  mountDesk(routes, services.desk);
  routes.requireComplete();
  routes.refuseOtherMethods();

  const router = express.Router();
  router.use(mendingAddresses, mendingBodies);
  router.use(noStore, express.json({ limit: '1mb' }), cookieParser());
  router.use(
    ...sessions({
      knex: services.knex,
      secret: config.sessionSecret,
      secure,
      cleanupIntervalMs: services.sessionCleanupMs,
    }),
  );
  router.use(passport.initialize(), passport.session());
  router.use(routes.router, noSuchAddress);
  return router;
}
