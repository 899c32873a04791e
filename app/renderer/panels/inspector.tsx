import { Tab, TabList, TabPanel, Tabs } from 'react-aria-components';
import { useMedia } from '../controls/use-media';
import { Findings } from './findings/findings';
import { PointsTable } from './points-table';
import { Readout } from './readout/readout';

/** Room for two columns of numbers beside the charts; the same as in the styles. */
const WIDE = '(min-width: 1800px)';

/** The numbers beside the charts: at the cursor, of the whole curve, of all points. */
export function Inspector() {
  const isWide = useMedia(WIDE);
  return (
    <div className="inspector">
      {isWide && (
        <section className="inspectorColumn" aria-label="At the cursor">
          <Readout />
        </section>
      )}
      <Tabs className="tabs" key={String(isWide)}>
        <TabList aria-label="Numbers">
          {!isWide && <Tab id="cursor">At the cursor</Tab>}
          <Tab id="findings">Findings</Tab>
          <Tab id="points">All points</Tab>
        </TabList>
        {!isWide && (
          <TabPanel id="cursor">
            <Readout />
          </TabPanel>
        )}
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
