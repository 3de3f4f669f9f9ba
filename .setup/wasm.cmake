# Toolchain file for the page: hands CMake over to Emscripten.
#
#   cmake -S . -B build/web -G Ninja -DCMAKE_TOOLCHAIN_FILE=.setup/wasm.cmake
#
# REJOINDER_EMSCRIPTEN_ROOT, an option or an environment variable, names the folder that holds emcc when another
# Emscripten than Debian's is wanted.
set(REJOINDER_EMSCRIPTEN_ROOT "$ENV{REJOINDER_EMSCRIPTEN_ROOT}" CACHE PATH
    "Folder that holds emcc; empty for the one that Debian's package installs")
list(APPEND CMAKE_TRY_COMPILE_PLATFORM_VARIABLES REJOINDER_EMSCRIPTEN_ROOT)

set(EMSCRIPTEN_ROOT_PATH "${REJOINDER_EMSCRIPTEN_ROOT}")
if(NOT EMSCRIPTEN_ROOT_PATH)
  set(EMSCRIPTEN_ROOT_PATH /usr/share/emscripten)
  # Debian keeps the JavaScript modules that the link step uses in the folder common to all of Node.js; the
  # link step is told so each time, so that building needs no environment of its own.
  set(ENV{NODE_PATH} /usr/share/nodejs)
  set(CMAKE_C_LINKER_LAUNCHER env NODE_PATH=/usr/share/nodejs)
  set(CMAKE_CXX_LINKER_LAUNCHER env NODE_PATH=/usr/share/nodejs)
endif()

if(NOT EXISTS "${EMSCRIPTEN_ROOT_PATH}/cmake/Modules/Platform/Emscripten.cmake")
  message(FATAL_ERROR "No Emscripten in ${EMSCRIPTEN_ROOT_PATH}. Run .setup/packages, or name the folder that "
                      "holds emcc with -DREJOINDER_EMSCRIPTEN_ROOT=...")
endif()
include("${EMSCRIPTEN_ROOT_PATH}/cmake/Modules/Platform/Emscripten.cmake")

find_program(NODE_PROGRAM NAMES node nodejs REQUIRED)
set(CMAKE_CROSSCOMPILING_EMULATOR "${NODE_PROGRAM}")
