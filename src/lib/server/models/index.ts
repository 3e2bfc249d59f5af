import type { Sequelize } from 'sequelize';
import { initAuditEvent } from './audit-event';
import { initClasses } from './class';
import { initCredential } from './credential';
import { initFurnaces } from './furnace';
import { initFindings } from './finding';
import { initHandouts } from './handout';
import { initKilns } from './kiln';
import { initLogs } from './log';
import { initMembership } from './membership';
import { initProfiles } from './profile';
import { initRuns } from './run';
import { initSession } from './session';
import { initSetupToken } from './setup-token';
import { initStudio } from './studio';
import { initStudioFigures } from './studio-figures';
import { initTariffs } from './tariff';
import { initThermocouples } from './thermocouple';
import { initThrottle } from './throttle';
import { initUser } from './user';

/** Declares every model on a connection. One line a model, in the order of the migrations. */
export function initModels(sequelize: Sequelize): void {
  // Sequelize writes the column's name into the description it is given: a description that two columns share would
  // give both the same name. Each column gets a copy.
  sequelize.addHook('beforeDefine', (attributes) => {
    for (const [name, description] of Object.entries(attributes))
      if (typeof description === 'object' && 'type' in description) attributes[name] = { ...description };
  });
  initStudio(sequelize);
  initUser(sequelize);
  initCredential(sequelize);
  initMembership(sequelize);
  initSession(sequelize);
  initThrottle(sequelize);
  initSetupToken(sequelize);
  initAuditEvent(sequelize);
  initTariffs(sequelize);
  initThermocouples(sequelize);
  initKilns(sequelize);
  initFurnaces(sequelize);
  initProfiles(sequelize);
  initClasses(sequelize);
  initHandouts(sequelize);
  initRuns(sequelize);
  initLogs(sequelize);
  initFindings(sequelize);
  initStudioFigures(sequelize);
}
