# For web/run and tests/run, which source it: what the machine must have, and how the parts are built.
# The caller has set `root` (the repository) and `build` (the folder everything is built in).

# One job a processor. Compiling is what takes the time.
jobs=$(nproc 2>/dev/null || echo 2)

say() { printf '%s\n' "$*"; }
complain() { printf '%s\n' "$*" >&2; }

# is_there <word>: a command on the path, or a file where the word begins with a slash.
is_there() {
    case $1 in
        /*) [ -e "$1" ] ;;
        *) command -v "$1" >/dev/null 2>&1 ;;
    esac
}

# ensure_installed <what>=<Debian package> …: installs the packages whose command or file is not there. Where nothing
# can be installed, says exactly what is missing, and fails.
ensure_installed() {
    local pair missing=() superuser=()
    for pair in "$@"; do
        is_there "${pair%%=*}" || missing+=("${pair#*=}")
    done
    [ ${#missing[@]} -eq 0 ] && return 0

    if [ "$(id -u)" -ne 0 ]; then
        if ! is_there sudo || ! { sudo -n true 2>/dev/null || { [ -t 0 ] && sudo -v; }; }; then
            complain "Missing: ${missing[*]}"
            complain "Nothing can be installed without root or sudo. As root: apt-get install ${missing[*]}"
            return 1
        fi
        superuser=(sudo)
    fi
    if ! is_there apt-get; then
        complain "Missing, by their names in Debian: ${missing[*]}"
        complain "This machine has no apt-get to install them with."
        return 1
    fi
    say "Installing ${missing[*]}"
    # A machine that never fetched the lists of packages, or long ago, must do so first.
    if ! { install_packages "${missing[@]}" || { "${superuser[@]}" apt-get update -q && install_packages "${missing[@]}"; }; } \
        >"$build/install.log" 2>&1; then
        tail -n 20 "$build/install.log" >&2
        complain "Missing, and could not be installed: ${missing[*]}"
        return 1
    fi
}

# install_packages <package> …: within ensure_installed only, whose `superuser` it uses.
install_packages() {
    "${superuser[@]}" env DEBIAN_FRONTEND=noninteractive apt-get install -y -q --no-install-recommends "$@"
}

# What building the program, the module and the page needs.
for_building=(
    g++=g++ cmake=cmake make=make /usr/include/nlohmann/json.hpp=nlohmann-json3-dev
    em++=emscripten /usr/share/nodejs/acorn=node-acorn node=nodejs npm=npm
)

# What the tests need beside.
for_testing=(
    /usr/include/doctest/doctest.h=doctest-dev /usr/include/rapidcheck.h=librapidcheck-dev
    /usr/include/boost/version.hpp=libboost-dev clang-format=clang-format clang-tidy=clang-tidy
    chromium=chromium firefox-esr=firefox-esr pdftotext=poppler-utils ip=iproute2
)

# The page's packages and tools, exactly as the lock file has them. None may run a script of its own on installing.
ensure_page_packages() {
    local lock=$root/web/package-lock.json installed=$root/web/node_modules/.forwright-lock
    node -e 'const [a, b] = process.versions.node.split("."); process.exit(a > 18 || (a == 18 && b >= 18) ? 0 : 1)' || {
        complain "Node.js $(node --version) is too old: 18.18 or later is needed."
        return 1
    }
    # The tests use the page's packages.
    ln -sfn ../web/node_modules "$root/tests/node_modules"
    cmp -s "$lock" "$installed" && return 0
    (cd "$root/web" && npm ci --ignore-scripts --no-audit --no-fund --loglevel=error) || {
        complain "The page's packages could not be installed by npm (web/package-lock.json)."
        return 1
    }
    cp "$lock" "$installed"
}

# configure_and_build <folder> <wrapper or ""> <target or ""> <options …>
configure_and_build() {
    local folder=$1 wrapper=$2 target=$3 log=$1/build.log
    shift 3
    mkdir -p "$folder"
    $wrapper cmake -S "$root" -B "$folder" "$@" >"$log" 2>&1 &&
        cmake --build "$folder" --parallel "$jobs" ${target:+--target $target} >>"$log" 2>&1 && return 0
    grep -nE -A12 'error|Error' "$log" | head -n 60 >&2
    complain "The whole log is $log"
    return 1
}

build_program() { configure_and_build "$build" "" "forwright" "$@"; }

build_module() {
    configure_and_build "$build/wasm" emcmake forwright-module "$@" &&
        node "$root/web/tools/pack-core.mjs" "$build/wasm" "$build/packed"
}

# The single file, $build/forwright.html.
build_page() {
    (cd "$root/web" && npm run --silent types && FORWRIGHT_BUILD=$build npx --no-install vite build --logLevel warn) &&
        cp "$build/page/forwright.html" "$build/forwright.html" &&
        node "$root/web/tools/report-size.mjs" "$build/packed" "$build/forwright.html"
}
