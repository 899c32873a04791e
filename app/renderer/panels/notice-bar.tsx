import { Button } from 'react-aria-components';
import { useController, useWindowState } from '../state/window-context';

/** Something that is no part of the study: a file that would not open, a host that is gone. */
export function NoticeBar() {
  const notice = useWindowState((state) => state.notice);
  const controller = useController();
  if (notice === undefined) return null;
  return (
    <div className="noticeBar" role="alert">
      <div>
        <strong>{notice.title}</strong>
        <ul>
          {notice.lines.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      </div>
      <Button className="quietButton" onPress={() => controller.dismissNotice()}>
        Close
      </Button>
    </div>
  );
}
