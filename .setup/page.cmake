# The page: web/ and Dear ImGui, compiled by Emscripten and packed into one file, rejoinder.html.

set(REJOINDER_IMGUI_DIR "$ENV{REJOINDER_IMGUI_DIR}" CACHE PATH
    "Own copy of Dear ImGui's source, 1.90 or newer but before 1.92; empty to have it fetched")
set(REJOINDER_FONT_DIR /usr/share/fonts/truetype/dejavu CACHE PATH
    "Folder of DejaVuSans.ttf, DejaVuSans-Bold.ttf and DejaVuSansMono.ttf")

# ---- Dear ImGui
set(imgui "${REJOINDER_IMGUI_DIR}")
if(NOT imgui)
  set(imgui "${PROJECT_SOURCE_DIR}/build/downloads/imgui")
  execute_process(COMMAND "${PROJECT_SOURCE_DIR}/.setup/fetch_imgui" "${PROJECT_SOURCE_DIR}/build/downloads"
                  RESULT_VARIABLE fetched)
  if(fetched)
    message(FATAL_ERROR "Without the source of Dear ImGui the page cannot be built; see above.")
  endif()
endif()
if(NOT EXISTS "${imgui}/imgui.h")
  message(FATAL_ERROR "No imgui.h in ${imgui}; REJOINDER_IMGUI_DIR names the folder that holds it.")
endif()
file(STRINGS "${imgui}/imgui.h" imgui_version REGEX "^#define +IMGUI_VERSION_NUM")
string(REGEX MATCH "[0-9]+" imgui_version "${imgui_version}")
if(imgui_version LESS 19000 OR NOT imgui_version LESS 19200)
  message(FATAL_ERROR "Dear ImGui in ${imgui} has version number ${imgui_version}; the page needs 19000 to 19199.")
endif()

add_library(imgui STATIC
  "${imgui}/imgui.cpp" "${imgui}/imgui_draw.cpp" "${imgui}/imgui_tables.cpp" "${imgui}/imgui_widgets.cpp"
  "${imgui}/backends/imgui_impl_opengl3.cpp")
target_include_directories(imgui SYSTEM PUBLIC "${imgui}" "${imgui}/backends")
target_compile_definitions(imgui PUBLIC
  IMGUI_IMPL_OPENGL_ES3 IMGUI_DISABLE_DEMO_WINDOWS IMGUI_DISABLE_DEBUG_TOOLS IMGUI_DISABLE_FILE_FUNCTIONS
  IMGUI_DISABLE_OBSOLETE_FUNCTIONS)
# What a contract says when it is broken names the file, but not the folders of whoever built the page.
target_compile_options(imgui PRIVATE "-fmacro-prefix-map=${imgui}/=imgui/")

# ---- The typeface: only the signs that reviews need, as C++ arrays
find_program(PYTHON_PROGRAM NAMES python3 PATHS /usr/bin NO_DEFAULT_PATH REQUIRED)
set(font_data "${PROJECT_BINARY_DIR}/generated/font_data.cc")
set(faces "${REJOINDER_FONT_DIR}/DejaVuSans.ttf" "${REJOINDER_FONT_DIR}/DejaVuSans-Bold.ttf"
          "${REJOINDER_FONT_DIR}/DejaVuSansMono.ttf")
add_custom_command(OUTPUT "${font_data}"
  COMMAND "${PYTHON_PROGRAM}" "${PROJECT_SOURCE_DIR}/.setup/subset_fonts" "${font_data}" ${faces}
  DEPENDS "${PROJECT_SOURCE_DIR}/.setup/subset_fonts" ${faces}
  COMMENT "Subsetting the typeface" VERBATIM)

# ---- The licences of everything inside the page, shown by the page itself
set(licence_data "${PROJECT_BINARY_DIR}/generated/licence_data.cc")
add_custom_command(OUTPUT "${licence_data}"
  COMMAND "${PYTHON_PROGRAM}" "${PROJECT_SOURCE_DIR}/.setup/collect_licences" "${licence_data}" "${imgui}/LICENSE.txt"
  DEPENDS "${PROJECT_SOURCE_DIR}/.setup/collect_licences" "${imgui}/LICENSE.txt"
  COMMENT "Collecting the licences" VERBATIM)

# ---- The platform: all that knows the browser
file(GLOB_RECURSE platform_sources CONFIGURE_DEPENDS web/platform/*.cc)
# Objects, as a library would leave out what only the page's scripts call.
add_library(platform OBJECT ${platform_sources} "${font_data}" "${licence_data}")
target_link_libraries(platform PUBLIC rejoinder_flags imgui)

# The scripts are joined in this order: page.js first, start.js last.
set(scripts)
foreach(name page sizing pointer keys clipboard files storage companion test_hook start)
  list(APPEND scripts "${PROJECT_SOURCE_DIR}/web/platform/${name}.js")
endforeach()

# A page of one file from an app (web/platform/app.h) and the platform.
function(add_page name file)
  add_executable(${name} ${ARGN})
  target_link_libraries(${name} PRIVATE platform)
  target_link_options(${name} PRIVATE
    -sMIN_WEBGL_VERSION=2 -sMAX_WEBGL_VERSION=2 -sFULL_ES3=0 -sFILESYSTEM=0 -sENVIRONMENT=web -sASSERTIONS=0
    -sMODULARIZE=1 -sEXPORT_NAME=createRejoinder
    -sEXPORTED_RUNTIME_METHODS=UTF8ToString,stringToUTF8,lengthBytesUTF8
    -sEXPORTED_FUNCTIONS=_main,_malloc,_free)
  set(packed "${PROJECT_BINARY_DIR}/${file}")
  set(page_html "${PROJECT_SOURCE_DIR}/web/page.html")
  add_custom_command(OUTPUT "${packed}"
    COMMAND "${NODE_PROGRAM}" "${PROJECT_SOURCE_DIR}/web/pack.mjs" "${packed}" "${page_html}"
            "$<TARGET_FILE:${name}>" "$<TARGET_FILE_DIR:${name}>/${name}.wasm" ${scripts}
    DEPENDS ${name} "${PROJECT_SOURCE_DIR}/web/pack.mjs" "${page_html}" ${scripts}
    COMMENT "Packing ${file}" VERBATIM)
  add_custom_target(pack_${name} ALL DEPENDS "${packed}")
endfunction()

# ---- rejoinder.html
file(GLOB app_sources CONFIGURE_DEPENDS web/*.cc web/panels/*.cc web/pictures/*.cc)
if(app_sources)
  add_page(page rejoinder.html ${app_sources})
  target_link_libraries(page PRIVATE workbench core)
else()
  message(STATUS "web/ holds no app yet, so rejoinder.html is left out")
endif()

# ---- platform_trial.html: a few widgets, by which the browser tests try the platform on its own
if(REJOINDER_TESTS)
  add_page(platform_trial platform_trial.html tests/browser/platform_trial.cc)
endif()
