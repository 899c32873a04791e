import { useSyncExternalStore } from 'react';
import { Tab, TabList, TabPanel, Tabs } from 'react-aria-components';
import { Findings } from './findings';
import { PointsTable } from './points-table';
import { Readout } from './readout/readout';

/** Room for two columns of numbers beside the charts. */
const WIDE = '(min-width: 1800px)';

function subscribe(listener: () => void): () => void {
  const query = matchMedia(WIDE);
  query.addEventListener('change', listener);
  return () => query.removeEventListener('change', listener);
}

/** The numbers beside the charts: at the cursor, of the whole curve, of all points. */
export function Inspector() {
  const isWide = useSyncExternalStore(subscribe, () => matchMedia(WIDE).matches);
  return isWide ? (
    <div className="inspector" data-wide>
      <section className="inspectorColumn" aria-label="At the cursor">
        <Readout />
      </section>
      <Tabs className="tabs">
        <TabList aria-label="Numbers">
          <Tab id="findings">Findings</Tab>
          <Tab id="points">All points</Tab>
        </TabList>
        <TabPanel id="findings">
          <Findings />
        </TabPanel>
        <TabPanel id="points">
          <PointsTable />
        </TabPanel>
      </Tabs>
    </div>
  ) : (
    <div className="inspector">
      <Tabs className="tabs">
        <TabList aria-label="Numbers">
          <Tab id="cursor">At the cursor</Tab>
          <Tab id="findings">Findings</Tab>
          <Tab id="points">All points</Tab>
        </TabList>
        <TabPanel id="cursor">
          <Readout />
        </TabPanel>
        <TabPanel id="findings">
          <Findings />
        </TabPanel>
        <TabPanel id="points">
          <PointsTable />
        </TabPanel>
      </Tabs>
    </div>
  );
}
