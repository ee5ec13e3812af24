# pilotis_kernels(TARGET SOURCE): compiles SOURCE once per instruction set and adds the objects to the library TARGET.
#
# SOURCE puts its entry functions into namespace pilotis::PILOTIS_INSTRUCTION_SET and everything else where it likes; its
# packs are PILOTIS_LANES doubles wide. Code for a newer processor must never be called on an older one, but the linker
# keeps one copy of an inline function whichever object it came from. So all symbols of an object but those of its own
# namespace are made local to it. On processors other than x86-64 there is the baseline alone.
set(PILOTIS_INSTRUCTION_SETS baseline)
set(PILOTIS_LANES_baseline 2)
if(CMAKE_SYSTEM_PROCESSOR STREQUAL "x86_64" AND NOT PILOTIS_SANITIZE)  # with sanitizers the baseline alone: time
  list(APPEND PILOTIS_INSTRUCTION_SETS x86_64_v2 x86_64_v3 x86_64_v4)
  set(PILOTIS_LANES_x86_64_v2 2)
  set(PILOTIS_MARCH_x86_64_v2 -march=x86-64-v2)
  set(PILOTIS_LANES_x86_64_v3 4)
  set(PILOTIS_MARCH_x86_64_v3 -march=x86-64-v3)
  set(PILOTIS_LANES_x86_64_v4 8)
  set(PILOTIS_MARCH_x86_64_v4 -march=x86-64-v4 -mprefer-vector-width=512)
endif()

function(pilotis_kernels target source)
  cmake_parse_arguments(arg "" "" "OPTIONS" ${ARGN})
  get_filename_component(name ${source} NAME_WE)
  foreach(set ${PILOTIS_INSTRUCTION_SETS})
    set(objects ${target}_${name}_${set})
    add_library(${objects} OBJECT ${source})
    target_compile_features(${objects} PRIVATE cxx_std_20)
    target_include_directories(${objects} PRIVATE ${PROJECT_SOURCE_DIR})
    target_link_libraries(${objects} PRIVATE pilotis_options)
    target_compile_definitions(${objects} PRIVATE PILOTIS_INSTRUCTION_SET=${set} PILOTIS_LANES=${PILOTIS_LANES_${set}})
    # -fno-gnu-unique: a symbol of that kind cannot be made local.
    target_compile_options(${objects} PRIVATE ${PILOTIS_MARCH_${set}} $<$<CXX_COMPILER_ID:GNU>:-fno-gnu-unique> ${arg_OPTIONS})
    set(local ${CMAKE_CURRENT_BINARY_DIR}/${name}_${set}.o)
    string(LENGTH ${set} length)
    add_custom_command(OUTPUT ${local}
      COMMAND ${CMAKE_LINKER} -r --force-group-allocation -o ${local} $<TARGET_OBJECTS:${objects}>
      COMMAND ${CMAKE_OBJCOPY} --wildcard "--keep-global-symbol=_ZN7pilotis${length}${set}*" ${local}
      DEPENDS $<TARGET_OBJECTS:${objects}> COMMAND_EXPAND_LISTS VERBATIM)
    set_source_files_properties(${local} PROPERTIES EXTERNAL_OBJECT TRUE GENERATED TRUE)
    target_sources(${target} PRIVATE ${local})
  endforeach()
endfunction()
