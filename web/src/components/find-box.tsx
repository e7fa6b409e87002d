import { useId } from 'react';
import { Form } from 'react-router-dom';

/** Leads to the results page; works on every page. */
export function FindBox({ initial = '' }: { initial?: string }) {
  const id = useId();
  return (
    <Form className="find" role="search" action="/find" method="get">
      <div className="field">
        <label htmlFor={id}>Find a device, provider or entry</label>
        <span className="findrow">
          <input id={id} name="q" type="search" defaultValue={initial} key={initial} maxLength={80} placeholder="Meadow-5 or EVB-000042" />
          <button className="btn main-act" type="submit">Find</button>
        </span>
      </div>
    </Form>
  );
}
