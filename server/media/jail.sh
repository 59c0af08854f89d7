#!/bin/bash
# Starts ffmpeg or ffprobe where a hostile file can do little harm. Everything is exec, so that the process
# started by the caller is the head of the new process group and dies as one with it.
#
#   jail.sh --jail=MODE --program=ffmpeg|ffprobe --memory-bytes=N --cpu-seconds=N --file-bytes=N -- ARGUMENTS
#
# MODE: bubblewrap  own mount, process and network namespaces: /usr read-only and the current directory, nothing else
#       unshare     own network namespace only
#       limits      resource limits and the unprivileged user only
# The current directory is the job's private directory; arguments name files relative to it.
set -euo pipefail

# The library that starts ffmpeg asks it once what it can do; those questions carry no file and need no directory.
case "${1-}" in
  -formats | -encoders | -codecs | -filters)
    exec env -i PATH=/usr/bin:/bin prlimit --core=0 --cpu=20 -- ffmpeg -hide_banner "$1"
    ;;
esac

mode='' program='' memory_bytes='' cpu_seconds='' file_bytes=''
while [ $# -gt 0 ]; do
  case "$1" in
    --jail=*) mode=${1#*=} ;;
    --program=*) program=${1#*=} ;;
    --memory-bytes=*) memory_bytes=${1#*=} ;;
    --cpu-seconds=*) cpu_seconds=${1#*=} ;;
    --file-bytes=*) file_bytes=${1#*=} ;;
    --) shift; break ;;
    *) echo "jail.sh: unknown argument $1" >&2; exit 64 ;;
  esac
  shift
done
case "$program" in
  ffmpeg | ffprobe) ;;
  *) echo 'jail.sh: --program must be ffmpeg or ffprobe' >&2; exit 64 ;;
esac

limits=(prlimit "--as=$memory_bytes" "--cpu=$cpu_seconds" "--fsize=$file_bytes" --nofile=64 --core=0)
clean=(env -i PATH=/usr/bin:/bin HOME=/nonexistent LANG=C.UTF-8)

# As root, become the unprivileged user for good; otherwise stay who we are, with no way up.
user=(setpriv --no-new-privs)
if [ "$(id -u)" = 0 ]; then
  limits+=(--nproc=512)
  user=(setpriv --reuid=65534 --regid=65534 --clear-groups --no-new-privs --inh-caps=-all --bounding-set=-all)
fi

case "$mode" in
  bubblewrap)
    namespaces=(--unshare-ipc --unshare-pid --unshare-net --unshare-uts)
    if [ "$(id -u)" = 0 ]; then
      # Kept only for setpriv, which gives them up before the program starts.
      namespaces+=(--cap-add CAP_SETUID --cap-add CAP_SETGID --cap-add CAP_SETPCAP)
    else
      namespaces+=(--unshare-user)
    fi
    exec setsid nice -n 10 "${limits[@]}" -- bwrap "${namespaces[@]}" --die-with-parent --new-session \
      --ro-bind /usr /usr --symlink usr/lib /lib --symlink usr/lib64 /lib64 --symlink usr/bin /bin \
      --perms 0755 --dir /etc --ro-bind-try /etc/alternatives /etc/alternatives --ro-bind-try /etc/ld.so.cache /etc/ld.so.cache \
      --dev /dev --bind "$PWD" /job --chdir /job \
      -- "${clean[@]}" "${user[@]}" -- "$program" "$@"
    ;;
  unshare)
    network=(unshare --net)
    [ "$(id -u)" = 0 ] || network=(unshare --map-current-user --net)
    exec setsid nice -n 10 "${limits[@]}" -- "${network[@]}" -- \
      "${clean[@]}" "${user[@]}" --pdeathsig KILL -- "$program" "$@"
    ;;
  limits)
    exec setsid nice -n 10 "${limits[@]}" -- "${clean[@]}" "${user[@]}" --pdeathsig KILL -- "$program" "$@"
    ;;
  *) echo "jail.sh: unknown mode $mode" >&2; exit 64 ;;
esac
