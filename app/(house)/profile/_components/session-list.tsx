'use client';

import { ActionForm } from '@/components/ui/action-form';
import { endSession } from '../actions';

export interface SessionLine {
  id: string;
  device: string;
  address: string;
  seen: string;
  since: string;
  isThis: boolean;
}

/** The browsers that one is signed in with; each can be signed out from here. */
export const SessionList = ({ sessions }: { sessions: readonly SessionLine[] }) => (
  <table className="stacked">
    <thead>
      <tr>
        <th scope="col">Browser</th>
        <th scope="col">Network address</th>
        <th scope="col">Signed in</th>
        <th scope="col">Last used</th>
        <th scope="col">
          <span className="sr">What can be done</span>
        </th>
      </tr>
    </thead>
    <tbody>
      {sessions.map(({ id, device, address, since, seen, isThis }) => (
        <tr key={id}>
          <td>{device}</td>
          <td>{address}</td>
          <td>{since}</td>
          <td>{seen}</td>
          <td>
            {isThis ? (
              <b>this one</b>
            ) : (
              <ActionForm
                act={endSession}
                submit="End it"
                busy="Ending"
                look="plain"
                label={`Session: ${device}, signed in ${since}`}
                className="again"
              >
                <input type="hidden" name="sessionId" value={id} />
              </ActionForm>
            )}
          </td>
        </tr>
      ))}
    </tbody>
  </table>
);
