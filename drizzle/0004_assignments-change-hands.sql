-- An editor takes over what another held: the one column that changes hands.
GRANT UPDATE (editor_id, taken_at) ON assignments TO counterfoil_web;
