import { Waiting } from '@/components/ui/waiting';

export default function Loading() {
  return (
    <div className="wrap lone">
      <Waiting>
        <p>
          <b>Turning to the page.</b>
        </p>
      </Waiting>
    </div>
  );
}
