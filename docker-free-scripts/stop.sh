#!/usr/bin/env bash
# Stops what start.sh started in this checkout: web, jobs, fakes and the database. The data stay.
set -euo pipefail
. "$(dirname "${BASH_SOURCE[0]}")/setup.sh"
[ -d "$DATA" ] || exit 0
make_data_folder
stop_processes "$DATA/run"
docker-free-scripts/db.sh stop
say "Stopped."
