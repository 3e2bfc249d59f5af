import type { Sequelize } from 'sequelize';
import { initAuditEvent } from './audit-event';
import { initCredential } from './credential';
import { initMembership } from './membership';
import { initSession } from './session';
import { initSetupToken } from './setup-token';
import { initStudio } from './studio';
import { initThrottle } from './throttle';
import { initUser } from './user';

/** Declares every model on a connection. One line a model, in the order of the migrations. */
export function initModels(sequelize: Sequelize): void {
  initStudio(sequelize);
  initUser(sequelize);
  initCredential(sequelize);
  initMembership(sequelize);
  initSession(sequelize);
  initThrottle(sequelize);
  initSetupToken(sequelize);
  initAuditEvent(sequelize);
}
