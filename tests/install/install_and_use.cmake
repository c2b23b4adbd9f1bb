# Installs bandwright to an empty prefix, then builds and runs a project that knows it by find_package alone.
#   kind      static or shared          source    this project's folder
#   built     a finished build of that kind, or empty: one is made here
#   work      folder for all of it      compiler, generator, version
cmake_minimum_required(VERSION 3.25)

function(run)
  execute_process(COMMAND ${ARGN} RESULT_VARIABLE status OUTPUT_VARIABLE output ERROR_VARIABLE output)
  string(JOIN " " line ${ARGN})
  if(NOT status EQUAL 0)
    message(FATAL_ERROR "${line}\n${output}\nended with status ${status}")
  endif()
  set(output "${output}" PARENT_SCOPE)
endfunction()

function(demand text)
  if(NOT output MATCHES "${text}")
    message(FATAL_ERROR "expected \"${text}\" in\n${output}")
  endif()
endfunction()

set(compile_with -G ${generator} -D CMAKE_CXX_COMPILER=${compiler} -D CMAKE_BUILD_TYPE=Debug)
set(ask_for -S ${source}/tests/install/stranger -D CMAKE_PREFIX_PATH=${work}/prefix)

if(NOT built)
  set(built ${work}/build)
  set(build_shared OFF)
  if(kind STREQUAL "shared")
    set(build_shared ON)
  endif()
  run(${CMAKE_COMMAND} -S ${source} -B ${built} ${compile_with} -D CMAKE_CXX_FLAGS_DEBUG=-O1
      -D BUILD_SHARED_LIBS=${build_shared})
  run(${CMAKE_COMMAND} --build ${built} --parallel 2)
endif()
file(REMOVE_RECURSE ${work}/prefix ${work}/stranger)
run(${CMAKE_COMMAND} --install ${built} --prefix ${work}/prefix)
file(GLOB_RECURSE libraries RELATIVE ${work}/prefix ${work}/prefix/*.a ${work}/prefix/*.so)
set(output "${libraries}")
if(kind STREQUAL "shared")
  demand("^[^;]*libbandwright[.]so$")
else()
  demand("^[^;]*libbandwright[.]a$")
endif()

run(${CMAKE_COMMAND} ${ask_for} -B ${work}/stranger ${compile_with} -D wanted_version=${version})
run(${CMAKE_COMMAND} --build ${work}/stranger)
run(${work}/stranger/stranger)
demand("bandwright ${version} reads 4K7 as 4700 ohm")
demand("1,2N3904,")

if(EXISTS ${built}/bin/bandwright)
  run(${work}/prefix/bin/bandwright --version)
  demand("${version}")
endif()

# A version that is not there must not be found.
execute_process(COMMAND ${CMAKE_COMMAND} ${ask_for} -B ${work}/refused ${compile_with} -D wanted_version=99.0
                RESULT_VARIABLE status OUTPUT_VARIABLE output ERROR_VARIABLE output)
if(status EQUAL 0)
  message(FATAL_ERROR "version 99.0 was found:\n${output}")
endif()
demand("99.0")
