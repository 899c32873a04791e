import { useEffect } from 'react';
import { DropZone, type FileDropItem } from 'react-aria-components';
import { useGround } from '../charts/use-ground';
import { useController } from '../state/window-context';
import { ChartPanel } from './chart-panel';
import { Inspector } from './inspector';
import { NoticeBar } from './notice-bar';
import { StudyPanel } from './study-panel';
import { TopBar } from './top-bar';

/** The whole window. A study or results file dropped anywhere on it is opened. */
export function Window() {
  const controller = useController();
  const ground = useGround();
  useEffect(() => {
    document.documentElement.dataset.ground = ground;
  }, [ground]);
  return (
    <DropZone
      className="window"
      aria-label="Drop a study or results file"
      onDrop={({ items }) => {
        const file = items.find((item): item is FileDropItem => item.kind === 'file');
        if (file !== undefined) void file.getText().then((text) => controller.openText(file.name, text));
      }}
    >
      <TopBar />
      <NoticeBar />
      <main>
        <StudyPanel />
        <div className="workspace">
          <ChartPanel />
          <Inspector />
        </div>
      </main>
    </DropZone>
  );
}
